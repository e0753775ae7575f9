'use client';

import { CheckField } from '@/components/ui/field';
import { ROLES, type PersonRole } from '@/lib/shared/people';
import { ROLE_WORDS } from './words';

interface RoleBoxesProps {
  roles: readonly PersonRole[];
  error?: string;
  onChange(roles: PersonRole[]): void;
}

/** A person may hold several roles; each with what it lets them do. */
export function RoleBoxes({ roles, error, onChange }: RoleBoxesProps) {
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-1 text-small text-grey">Roles</legend>
      {ROLES.map((role) => (
        <CheckField
          key={role}
          label={role}
          hint={ROLE_WORDS[role]}
          checked={roles.includes(role)}
          onChange={(event) => onChange(event.target.checked ? [...roles, role] : roles.filter((other) => other !== role))}
        />
      ))}
      {error && <p className="border-l-2 border-red pl-2 text-red">{error}</p>}
    </fieldset>
  );
}
