import http from 'node:http';

/**
 * Loaded before the server: once it has been told to stop, a connection ends with the answer that was under way on it.
 * Node ends only those that are idle at that moment; the others would keep the server for their whole keep-alive.
 */
const emit = http.Server.prototype.emit;

http.Server.prototype.emit = function (event, request, response, ...rest) {
  if (event === 'request')
    response.once('finish', () => {
      if (!this.listening) setImmediate(() => this.closeIdleConnections());
    });
  return emit.call(this, event, request, response, ...rest);
};
