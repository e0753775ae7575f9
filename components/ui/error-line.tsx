import type { ReactNode } from 'react';

/** What did not happen and what to do: ink on paper with a red stroke, read aloud when it appears. */
export function ErrorLine({ children, actions }: { children: ReactNode; actions?: ReactNode }) {
  return (
    <div role="alert" className="flex flex-wrap items-center gap-x-4 gap-y-2 border-l-4 border-red py-1 pl-3">
      <p className="min-w-0 font-semibold text-red">{children}</p>
      {actions}
    </div>
  );
}

/** Something went as wished: said quietly. */
export function DoneLine({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="border-l-4 border-ink py-1 pl-3">
      {children}
    </p>
  );
}
