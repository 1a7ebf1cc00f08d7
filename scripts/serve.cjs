/** A small server of one folder, for this machine alone: no dependency, right types, nothing outside the folder. */
const fs = require('node:fs');
const http = require('node:http');
const https = require('node:https');
const path = require('node:path');

const TYPES = {
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.map': 'application/json; charset=utf-8',
  '.png': 'image/png',
  '.svg': 'image/svg+xml; charset=utf-8',
  '.txt': 'text/plain; charset=utf-8',
  '.woff2': 'font/woff2',
  '.xlsx': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  '.xml': 'application/xml; charset=utf-8',
};

/** The file an address means, or null when it would leave the folder or is no address. */
function fileOf(folder, address) {
  let name;
  try {
    name = decodeURIComponent((address ?? '/').split(/[?#]/)[0]);
  } catch {
    return null;
  }
  if (name.includes('\0')) return null;
  const file = path.join(folder, name.endsWith('/') ? `${name}index.html` : name);
  return file.startsWith(folder + path.sep) ? file : null;
}

function answer(folder, front, request, response) {
  const say = (status, text, headers = {}) => {
    response.writeHead(status, { 'content-type': TYPES['.txt'], ...headers });
    response.end(request.method === 'HEAD' ? undefined : text);
  };
  if (request.method !== 'GET' && request.method !== 'HEAD')
    return say(405, 'Only GET and HEAD.', { allow: 'GET, HEAD' });
  if (front && request.url === '/') return say(302, front, { location: front });
  const file = fileOf(folder, request.url);
  if (file === null) return say(400, 'No such address.');
  fs.readFile(file, (fault, bytes) => {
    if (fault) return say(404, 'Not found.');
    response.writeHead(200, {
      'content-type': TYPES[path.extname(file)] ?? 'application/octet-stream',
      'content-length': bytes.length,
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    });
    response.end(request.method === 'HEAD' ? undefined : bytes);
  });
}

/**
 * Serves `folder` on 127.0.0.1. A port in use moves on to the next free one, unless it was asked for by name (`fixed`).
 * @param {{ folder: string, port?: number, fixed?: boolean, front?: string, tls?: { key: Buffer, cert: Buffer } }} options
 *   front: where "/" leads; tls: serve over https
 * @returns {Promise<{ origin: string, close(): Promise<void> }>}
 */
function serve({ folder, port = 0, fixed = false, front, tls }) {
  const base = path.resolve(folder);
  const listener = (request, response) => answer(base, front, request, response);
  const server = tls ? https.createServer(tls, listener) : http.createServer(listener);
  return new Promise((resolve, reject) => {
    server.once('listening', () => {
      const name = tls ? 'https://localhost' : 'http://127.0.0.1';
      resolve({
        origin: `${name}:${server.address().port}`,
        close: () =>
          new Promise((closed) => {
            server.close(() => closed());
            server.closeAllConnections();
          }),
      });
    });
    server.on('error', (fault) => {
      if (fault.code === 'EADDRINUSE' && !fixed && port !== 0) server.listen(++port, '127.0.0.1');
      else reject(fault);
    });
    server.listen(port, '127.0.0.1');
  });
}

module.exports = { fileOf, serve };
