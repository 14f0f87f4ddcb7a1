import { ROLE_NAMES, ROLE_WORDS } from './roles-in-words';
import { ROLES, type Role } from '@/app/_shared/roles';
import { Badge } from '@/components/badge';

/** What each role does, with one's own marked. */
export function RoleGuide({ own }: { readonly own: Role }) {
  return (
    <section aria-labelledby="roles" className="mt-10">
      <h2 id="roles" className="mb-3 text-[17px] font-semibold">
        What each role does
      </h2>
      <dl className="grid gap-x-8 gap-y-4 sm:grid-cols-2">
        {ROLES.map((role) => (
          <div key={role} className="border-t border-rule pt-3">
            <dt className="flex items-center gap-2 text-sm font-semibold">
              {ROLE_NAMES[role]}
              {role === own && <Badge tone="voltage">Yours</Badge>}
            </dt>
            <dd className="mt-1 text-sm leading-normal text-pretty text-muted">{ROLE_WORDS[role]}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
