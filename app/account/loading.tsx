import { HouseFrame } from '@/app/_frame/house-frame';
import { HouseMasthead } from '@/app/_frame/house-masthead';
import { PageHeading } from '@/app/_frame/page-heading';
import { Skeleton } from '@/components/skeleton';

export default function AccountLoading() {
  return (
    <HouseFrame masthead={<HouseMasthead room="account" />} width="text">
      <p role="status" className="sr-only">
        Your account is on its way.
      </p>
      <PageHeading title="Account" />
      {['h-[72px]', 'h-[210px]', 'h-[30px]'].map((height) => (
        <div key={height} className="grid gap-x-8 gap-y-4 border-t border-rule py-6 sm:grid-cols-[13rem_minmax(0,1fr)]">
          <Skeleton className="h-4 w-24" />
          <Skeleton className={`max-w-90 ${height}`} />
        </div>
      ))}
    </HouseFrame>
  );
}
