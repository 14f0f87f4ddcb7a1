import { Logo } from '@/components/logo';
import { Skeleton } from '@/components/skeleton';

/** The room in its own layout, before the sheet is there. */
export default function SheetLoading() {
  return (
    <div aria-busy="true" aria-label="The sheet is on its way" className="workbench grid h-dvh w-full overflow-hidden bg-paper">
      <div className="workbench-masthead flex h-12 items-center gap-3 border-b border-rule bg-raised pr-2 pl-3 sm:pr-4 sm:pl-4">
        <Logo size={28} />
        <Skeleton className="hidden h-4 w-36 lg:block" />
        <Skeleton className="h-4 w-52" />
        <Skeleton className="h-4 w-24" />
      </div>
      <div className="workbench-shelf hidden w-16 flex-col items-center gap-6 border-r border-rule bg-raised pt-6 sm:flex">
        {['Resist', 'Store', 'Drive', 'Join'].map((group) => (
          <Skeleton key={group} className="h-10 w-10" />
        ))}
      </div>
      <div className="workbench-drawing" />
      <div className="workbench-ledger hidden flex-col gap-3 border-l border-rule bg-raised p-4 md:flex">
        <Skeleton className="h-5 w-28" />
        <Skeleton className="h-9 w-full" />
        <Skeleton className="h-4 w-full" />
        <Skeleton className="h-4 w-full" />
        <Skeleton className="h-4 w-2/3" />
      </div>
      <div className="workbench-band h-16 border-t border-rule bg-raised" />
    </div>
  );
}
