import http from 'node:http';

/**
 * Loaded before the server: what a client says of its own address and of the host it was forwarded for is thrown away,
 * and the address is written from the connection. Behind a proxy of one's own, TRUST_PROXY=1 takes the last address that
 * this proxy has added. Headers that only the framework may set for itself are dropped as well.
 */
const CLAIMS = [
  'x-forwarded-for',
  'x-forwarded-host',
  'x-forwarded-proto',
  'x-forwarded-port',
  'x-real-ip',
  'forwarded',
];
const INTERNAL = [
  'x-middleware-subrequest',
  'x-middleware-prefetch',
  'x-nextjs-data',
  'x-now-route-matches',
  'x-matched-path',
];

const behindProxy = process.env.TRUST_PROXY === '1';
const emit = http.Server.prototype.emit;

http.Server.prototype.emit = function (event, request, ...rest) {
  if (event === 'request' || event === 'upgrade') {
    const last = behindProxy ? request.headers['x-forwarded-for']?.split(',').at(-1)?.trim() : undefined;
    for (const name of [...CLAIMS, ...INTERNAL]) delete request.headers[name];
    request.headers['x-forwarded-for'] = last || request.socket.remoteAddress || 'unknown';
  }
  return emit.call(this, event, request, ...rest);
};
