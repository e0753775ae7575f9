import { createTeam } from '@/lib/server/people/create-team';
import { sequelize } from '@/models';

/** npm run team -- "Name of the firm" "Name of its admin" admin@example.org: makes a team and prints the admin's link. */
const [name, person, email] = process.argv.slice(2);
if (!name || !person || !email) {
  console.error('Say it like this: npm run team -- "Name of the firm" "Your name" you@example.org');
  process.exit(2);
}
createTeam(name, { name: person, email })
  .then(({ link, expiresAt }) =>
    console.log(`${name} is made. ${person} sets a password here until ${expiresAt.slice(0, 10)}:\n${link}`),
  )
  .catch((error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  })
  .finally(() => sequelize.close());
