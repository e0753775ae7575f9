/** Larger and smaller, for whoever has no keys. */
export function ZoomButtons({ onSmaller, onLarger }: { onSmaller(): void; onLarger(): void }) {
  return (
    <div className="absolute right-3 bottom-3 flex border border-ink bg-paper">
      {(
        [
          ['−', 'Smaller', onSmaller],
          ['+', 'Larger', onLarger],
        ] as const
      ).map(([sign, name, does]) => (
        <button
          key={name}
          type="button"
          aria-label={name}
          className="min-h-8 min-w-8 cursor-pointer border-l border-ink text-head first:border-l-0 pointer-coarse:min-h-11 pointer-coarse:min-w-11"
          onClick={does}
        >
          {sign}
        </button>
      ))}
    </div>
  );
}
