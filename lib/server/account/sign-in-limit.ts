import 'server-only';
import { createHash } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { sequelize } from '@/models';

interface Bucket {
  name: string;
  most: number;
  seconds: number;
}
export interface Try {
  email: string;
  address: string;
  /** this browser has signed in as this person before */
  known: boolean;
}

/**
 * Five tries a minute for an address and an account, as the sign-in sheet says; twenty in a quarter of an hour for an
 * account from all the browsers that never signed in to it, and sixty for an address (a class behind one router). A
 * browser that has signed in before is counted apart, so that strangers who guess do not shut the person out.
 */
function bucketsOf({ email, address, known }: Try): Bucket[] {
  if (known) return [{ name: `known ${email}`, most: 10, seconds: 15 * 60 }];
  return [
    { name: `pair ${email} ${address}`, most: 5, seconds: 60 },
    { name: `account ${email}`, most: 20, seconds: 15 * 60 },
    { name: `address ${address}`, most: 60, seconds: 15 * 60 },
  ];
}

/** Who tried is not kept in words. */
const keyOf = ({ name }: Bucket) => createHash('sha256').update(name).digest('hex');

/**
 * Counts a try before the password is looked at, so that many at once cannot pass together.
 * @returns seconds to wait; 0 when it may go on
 */
export async function takeTry(attempt: Try): Promise<number> {
  for (const bucket of bucketsOf(attempt)) {
    const [row] = await sequelize.query<{ tries: number; left: number }>(
      `insert into sign_in_counts as s (bucket, tries, ends_at) values ($1, 1, now() + make_interval(secs => $2))
       on conflict (bucket) do update
         set tries = case when s.ends_at <= now() then 1 else s.tries + 1 end,
             ends_at = case when s.ends_at <= now() then excluded.ends_at else s.ends_at end
       returning tries, ceil(extract(epoch from ends_at - now()))::int as left`,
      { bind: [keyOf(bucket), bucket.seconds], type: QueryTypes.SELECT },
    );
    if (row!.tries > bucket.most) return Math.max(1, row!.left);
  }
  return 0;
}

/** A right password: its try does not count, and neither do the person's own slips before it. */
export async function giveBack(attempt: Try): Promise<void> {
  const [first, ...shared] = bucketsOf(attempt).map(keyOf);
  await sequelize.query('delete from sign_in_counts where bucket = $1 or ends_at < now()', { bind: [first] });
  await sequelize.query('update sign_in_counts set tries = greatest(1, tries - 1) where bucket = any($1::text[])', {
    bind: [shared],
  });
}
