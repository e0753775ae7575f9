import { acceptInvitation } from '@/lib/server/people/accept-invitation';
import { openRoute } from '@/lib/server/route';
import { AcceptInviteSchema } from '@/lib/shared/people';

/** POST /api/invitations/accept sets a password by a one-time token and answers the address to sign in with. */
export const POST = openRoute({ body: AcceptInviteSchema }, ({ body }) => acceptInvitation(body));
