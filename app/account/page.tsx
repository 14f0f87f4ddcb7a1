import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { PasswordForm } from './password-form';
import { SignOutButton } from './sign-out-button';
import { HousePage } from '@/app/_frame/house-page';
import { PageHeading } from '@/app/_frame/page-heading';
import { requireViewer } from '@/app/_server/viewer';
import { ROLE_NAMES } from '@/app/team/roles-in-words';
import { parseTheme, THEME_COOKIE } from '@/components/theme';
import { ThemeSwitch } from '@/components/theme-switch';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const viewer = await requireViewer();
  const theme = parseTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <HousePage viewer={viewer} room="account" width="text">
      <PageHeading title="Account" />
      <Section id="person" title="You">
        <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-6 gap-y-1.5 text-sm">
          <dt className="text-muted">Name</dt>
          <dd className="wrap-anywhere">{viewer.name}</dd>
          <dt className="text-muted">E-mail</dt>
          <dd className="wrap-anywhere">{viewer.email}</dd>
          <dt className="text-muted">Team</dt>
          <dd className="wrap-anywhere">
            {viewer.teamName}, as {ROLE_NAMES[viewer.role].toLowerCase()}
          </dd>
        </dl>
      </Section>
      <Section id="password" title="Password" text="A change signs you out everywhere but in this browser.">
        <PasswordForm email={viewer.email} />
      </Section>
      <Section id="theme" title="Theme" text="In this browser.">
        <ThemeSwitch theme={theme} showLabels />
      </Section>
      <Section id="session" title="Session">
        <SignOutButton />
      </Section>
    </HousePage>
  );
}

function Section({
  id,
  title,
  text,
  children,
}: {
  readonly id: string;
  readonly title: string;
  readonly text?: string;
  readonly children: ReactNode;
}) {
  return (
    <section
      aria-labelledby={id}
      className="grid gap-x-8 gap-y-4 border-t border-rule py-6 sm:grid-cols-[13rem_minmax(0,1fr)]"
    >
      <div>
        <h2 id={id} className="text-[15px] font-semibold">
          {title}
        </h2>
        {text !== undefined && <p className="mt-0.5 text-[13px] text-pretty text-muted">{text}</p>}
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  );
}
