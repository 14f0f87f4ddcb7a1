'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { AnchorHTMLAttributes } from 'react';

export type AheadLinkProps = AnchorHTMLAttributes<HTMLAnchorElement> & { readonly href: string };

/**
 * A link whose page is asked for when a hand or the focus comes to it. The framework's own way, to ask for every page
 * whose link is in view, would load all that a person might go to before what they came for is idle.
 */
export function AheadLink({ href, ...rest }: AheadLinkProps) {
  const router = useRouter();
  const ahead = (): void => router.prefetch(href);
  return <Link {...rest} href={href} prefetch={false} onPointerEnter={ahead} onFocus={ahead} />;
}
