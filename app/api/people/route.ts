import { invitePerson } from '@/lib/server/people/invite-person';
import { listPeople } from '@/lib/server/people/list-people';
import { route } from '@/lib/server/route';
import { InviteSchema } from '@/lib/shared/people';

/** GET /api/people answers everybody of the team. */
export const GET = route({}, ({ actor }) => listPeople(actor));

/** POST /api/people invites a person and answers the one-time link; it is shown this once. */
export const POST = route({ body: InviteSchema, status: 201 }, ({ actor, body }) => invitePerson(actor, body));
