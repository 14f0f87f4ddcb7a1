import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { openSheet } from '../_room/open-sheet';

/**
 * Whether there is such a sheet is asked above the skeleton: once that is on its way to the browser, the answer is 200
 * for good, and a sheet that is not there has to be a 404.
 */
export default async function SheetLayout({
  params,
  children,
}: {
  readonly params: Promise<{ readonly id: string }>;
  readonly children: ReactNode;
}) {
  const { sheet } = await openSheet((await params).id);
  if (sheet === null) notFound();
  return children;
}
