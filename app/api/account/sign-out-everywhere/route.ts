import { signOutEverywhere } from '@/lib/server/account/sign-out-everywhere';
import { route } from '@/lib/server/route';

/** POST /api/account/sign-out-everywhere ends every session of the person who asks. */
export const POST = route({}, ({ actor }) => signOutEverywhere(actor));
