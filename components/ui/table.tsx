import type { ReactNode, ThHTMLAttributes } from 'react';

export interface Sort {
  /** null: this column does not decide the order */
  direction: 'asc' | 'desc' | null;
  onSort(): void;
}

const heading = 'h-6 border-b-2 border-ink px-2 pb-1 text-left align-bottom text-small font-normal text-grey';

/** A column's heading; with `sort` it is a button that sorts and, pressed again, turns the order round. */
export function Heading({ sort, children, className = '', ...rest }: ThHTMLAttributes<HTMLTableCellElement> & { sort?: Sort; children?: ReactNode }) {
  const order = sort?.direction === 'asc' ? 'ascending' : sort?.direction === 'desc' ? 'descending' : undefined;
  return (
    <th scope="col" aria-sort={order} className={`${heading} ${className}`} {...rest}>
      {sort ? (
        <button
          type="button"
          className={`cursor-pointer whitespace-nowrap hover:underline hover:underline-offset-2 ${order ? 'font-bold text-ink' : ''}`}
          onClick={sort.onSort}
        >
          {children}
          {order && <span aria-hidden="true"> {sort.direction === 'asc' ? '↑' : '↓'}</span>}
        </button>
      ) : (
        children
      )}
    </th>
  );
}
