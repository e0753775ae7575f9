import { changePerson } from '@/lib/server/people/change-person';
import { route } from '@/lib/server/route';
import { PersonParams, PersonPatchSchema } from '@/lib/shared/people';

/** PATCH /api/people/:personId changes roles, switches off or on. */
export const PATCH = route({ params: PersonParams, body: PersonPatchSchema }, ({ actor, params, body }) =>
  changePerson(actor, params.personId, body),
);
