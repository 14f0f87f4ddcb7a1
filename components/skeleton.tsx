import { classNames } from './class-names';

/** A quiet place-holder in the shape of what comes; its size is given by `className`. Still: nothing pulses. */
export function Skeleton({ className }: { readonly className?: string }) {
  return <div aria-hidden="true" className={classNames('rounded-[5px] bg-wash', className)} />;
}
