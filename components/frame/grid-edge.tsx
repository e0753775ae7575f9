const COLUMNS = ['1', '2', '3', '4', '5', '6', '7', '8'];
const ROWS = ['A', 'B', 'C', 'D', 'E', 'F'];

/** The grid of a drawing sheet between the paper's edge and its border: by it a place is named, "G1 at B6". */
export function GridEdge() {
  const across = (
    <>
      {COLUMNS.map((name, i) => (
        <span key={name} className={`flex flex-1 items-center justify-center ${i > 0 ? 'border-l border-rule' : ''}`}>
          {name}
        </span>
      ))}
    </>
  );
  const down = (
    <>
      {ROWS.map((name, i) => (
        <span key={name} className={`flex flex-1 items-center justify-center ${i > 0 ? 'border-t border-rule' : ''}`}>
          {name}
        </span>
      ))}
    </>
  );
  return (
    <div aria-hidden="true" className="pointer-events-none absolute inset-0 hidden text-small text-grey select-none sm:block print:hidden">
      <div className="absolute inset-x-4 top-0 flex h-4">{across}</div>
      <div className="absolute inset-x-4 bottom-0 flex h-4">{across}</div>
      <div className="absolute inset-y-4 left-0 flex w-4 flex-col">{down}</div>
      <div className="absolute inset-y-4 right-0 flex w-4 flex-col">{down}</div>
    </div>
  );
}
