'use client';

interface ColumnPagesProps {
  pages: readonly string[];
  page: string;
  onTurn(page: string): void;
  /** "Schedule of ways" */
  of: string;
}

/** On a narrow sheet: the columns that do not stay are turned to by name; arrows and swipes of the table are left alone. */
export function ColumnPages({ pages, page, onTurn, of }: ColumnPagesProps) {
  if (pages.length < 2) return null;
  const at = pages.indexOf(page);
  return (
    <div
      role="group"
      aria-label={`Columns of the ${of.toLowerCase()}`}
      className="mb-2 flex flex-wrap items-center gap-1 min-[901px]:hidden print:hidden"
    >
      <button
        type="button"
        aria-label="Columns before"
        disabled={at <= 0}
        className="flex min-h-11 min-w-8 cursor-pointer items-center justify-center text-head disabled:text-grey"
        onClick={() => onTurn(pages[at - 1]!)}
      >
        ←
      </button>
      {pages.map((name) => (
        <button
          key={name}
          type="button"
          aria-pressed={name === page}
          className={`min-h-11 cursor-pointer px-2 ${name === page ? 'border-b-2 border-ink font-bold' : 'text-grey underline underline-offset-4'}`}
          onClick={() => onTurn(name)}
        >
          {name}
        </button>
      ))}
      <button
        type="button"
        aria-label="Columns after"
        disabled={at >= pages.length - 1}
        className="flex min-h-11 min-w-8 cursor-pointer items-center justify-center text-head disabled:text-grey"
        onClick={() => onTurn(pages[at + 1]!)}
      >
        →
      </button>
    </div>
  );
}
