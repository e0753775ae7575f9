import { z } from 'zod';
import { listClients } from '@/lib/server/clients/list-clients';
import { route } from '@/lib/server/route';

const Query = z.object({ search: z.string().trim().max(80).default('') });

/** GET /api/clients?search= answers the first clients of the team whose name has the text in it. */
export const GET = route({ query: Query }, ({ actor, query }) => listClients(actor, query.search));
