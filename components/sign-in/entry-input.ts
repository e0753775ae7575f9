/** A field that fills its cell of the title block. */
export const entryInput =
  'block h-10 w-full bg-transparent px-2 text-[16px] leading-6 text-ink placeholder:text-grey focus-visible:-outline-offset-2 aria-invalid:border-b-2 aria-invalid:border-red';
