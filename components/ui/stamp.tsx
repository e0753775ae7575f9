export type StampShape = 'dashed' | 'outlined' | 'red' | 'filled';

const shapes: Record<StampShape, string> = {
  dashed: 'border border-dashed border-ink text-ink',
  outlined: 'border-[1.5px] border-ink font-semibold text-ink',
  red: 'border-[1.5px] border-red font-semibold text-red outline-1 outline-offset-2 outline-red outline-dotted',
  filled: 'border-[1.5px] border-ink bg-ink font-semibold text-paper',
};

/** A state as it is stamped on paper: told apart by shape and word, never by colour alone. */
export function Stamp({ shape, children }: { shape: StampShape; children: string }) {
  return (
    <span className={`inline-block px-1.5 py-px text-[11px] leading-4 tracking-[0.06em] whitespace-nowrap uppercase ${shapes[shape]}`}>
      {children}
    </span>
  );
}
