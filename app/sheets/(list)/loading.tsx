import { rowGrid } from './row-grid';
import { HouseFrame } from '@/app/_frame/house-frame';
import { HouseMasthead } from '@/app/_frame/house-masthead';
import { PageHeading } from '@/app/_frame/page-heading';
import { Skeleton } from '@/components/skeleton';

const ROWS = [68, 54, 61, 47, 64, 58];

export default function SheetsLoading() {
  return (
    <HouseFrame masthead={<HouseMasthead room="sheets" />}>
      <PageHeading title="Sheets">
        <Skeleton className="h-9 w-52" />
      </PageHeading>
      <p role="status" className="sr-only">
        The sheets are on their way.
      </p>
      <div className="mb-4 flex gap-2">
        <Skeleton className="h-9 flex-1 sm:max-w-80" />
        <Skeleton className="h-9 w-36" />
      </div>
      <div aria-hidden="true" className="-mx-2 border-t border-rule lg:mt-8">
        {ROWS.map((width, index) => (
          <div key={index} className={rowGrid}>
            <div className="flex h-[45px] flex-col justify-center gap-2">
              <Skeleton className="h-4 w-56 max-w-full" />
              <div className="flex" style={{ maxWidth: `${width}%` }}>
                <Skeleton className="h-3 flex-1" />
              </div>
            </div>
          </div>
        ))}
      </div>
    </HouseFrame>
  );
}
