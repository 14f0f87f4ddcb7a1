/** One row of the list: a block on a narrow screen, a line with columns of figures on a wide one. */
export const rowGrid =
  'relative grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-rule py-3 pr-1 pl-2 ' +
  'lg:grid-cols-[minmax(0,1fr)_4rem_5rem_5.5rem_4.5rem_11rem_2.25rem] lg:gap-x-5';
