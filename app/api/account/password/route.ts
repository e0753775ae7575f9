import { changePassword } from '@/lib/server/account/change-password';
import { route } from '@/lib/server/route';
import { ChangePasswordSchema } from '@/lib/shared/people';

/** POST /api/account/password changes one's own password and ends one's other sessions. */
export const POST = route({ body: ChangePasswordSchema }, ({ actor, body }) => changePassword(actor, body));
