import { HouseFrame } from '@/app/_frame/house-frame';
import { HouseMasthead } from '@/app/_frame/house-masthead';
import { Skeleton } from '@/components/skeleton';

export default function TeamLoading() {
  return (
    <HouseFrame masthead={<HouseMasthead room="team" />} width="text">
      <p role="status" className="sr-only">
        The team is on its way.
      </p>
      <Skeleton className="mb-5 h-9 w-64 max-w-full" />
      <div className="border-t border-rule">
        {[0, 1, 2, 3].map((row) => (
          <div key={row} className="flex h-[69px] items-center gap-3 border-b border-rule">
            <Skeleton className="size-9 rounded-full" />
            <div className="flex-1">
              <Skeleton className="mb-2 h-4 w-40" />
              <Skeleton className="h-3 w-56 max-w-full" />
            </div>
            <Skeleton className="h-9 w-34" />
          </div>
        ))}
      </div>
    </HouseFrame>
  );
}
