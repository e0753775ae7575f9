// Only the oldest words here: this file has to be readable to a Node that is too old for the rest.
var wanted = [20, 19];
var have = process.versions.node.split('.').map(Number);
if (have[0] < wanted[0] || (have[0] === wanted[0] && have[1] < wanted[1])) {
  console.error(
    'Ohmstead needs Node ' +
      wanted.join('.') +
      ' or newer; this is ' +
      process.version +
      '. Install it (on Debian 12: from nodejs.org) and start again.',
  );
  process.exit(1);
}
import('./start-app.mjs').then(function (app) {
  return app.start({ dev: process.argv.indexOf('--dev') !== -1 });
});
