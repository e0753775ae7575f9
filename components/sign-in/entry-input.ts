/** A field that fills its cell of the title block. */
export const entryInput =
  'block h-10 w-full bg-transparent px-2 text-[16px] leading-6 text-ink outline-none placeholder:text-grey focus:outline-2 focus:-outline-offset-2 focus:outline-blue aria-invalid:border-b-2 aria-invalid:border-red';
