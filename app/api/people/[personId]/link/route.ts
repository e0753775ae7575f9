import { renewLink } from '@/lib/server/people/renew-link';
import { route } from '@/lib/server/route';
import { PersonParams } from '@/lib/shared/people';

/** POST /api/people/:personId/link answers a fresh one-time link with which the person sets a password. */
export const POST = route({ params: PersonParams, status: 201 }, ({ actor, params }) =>
  renewLink(actor, params.personId),
);
