/** A key of the keyboard, as printed on it. */
export function Key({ children }: { children: string }) {
  return <kbd className="inline-block border border-rule px-1 font-mono text-[11px] leading-[14px] text-ink">{children}</kbd>;
}
