// A small server for the built page: files of dist/ only, right types, the content security policy as a header.
import { createReadStream, statSync } from 'node:fs';
import { createServer } from 'node:http';
import { extname, join, normalize, sep } from 'node:path';
import { DIST } from './build.mjs';
import { SERVER_POLICY } from './policy.mjs';

const TYPES = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.webmanifest': 'application/manifest+json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.ttf': 'font/ttf',
  '.wasm': 'application/wasm',
  '.txt': 'text/plain; charset=utf-8',
  '.md': 'text/markdown; charset=utf-8',
  '.pdf': 'application/pdf',
};

/** @returns {{path: string, size: number} | undefined} the file of `folder` an address names; none outside it */
function find(address, folder) {
  let path;
  try {
    path = normalize(join(folder, decodeURIComponent(new URL(address, 'http://localhost').pathname)));
  } catch {
    return undefined;
  }
  if (!`${path}${sep}`.startsWith(`${folder}${sep}`) || path.includes('\0')) return undefined;
  for (const candidate of [path, join(path, 'index.html')]) {
    const stat = statSync(candidate, { throwIfNoEntry: false });
    if (stat?.isFile()) return { path: candidate, size: stat.size };
  }
  return undefined;
}

function answer(request, response, folder) {
  const headers = {
    'Content-Security-Policy': SERVER_POLICY,
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'no-referrer',
    'Cross-Origin-Opener-Policy': 'same-origin',
    // A rebuilt page is seen at once.
    'Cache-Control': 'no-cache',
  };
  if (request.method !== 'GET' && request.method !== 'HEAD') return response.writeHead(405, { ...headers, Allow: 'GET, HEAD' }).end();
  const file = find(request.url, folder);
  if (!file) return response.writeHead(404, { ...headers, 'Content-Type': TYPES['.txt'] }).end('Not found\n');
  response.writeHead(200, { ...headers, 'Content-Type': TYPES[extname(file.path)] ?? 'application/octet-stream', 'Content-Length': file.size });
  if (request.method === 'HEAD') return response.end();
  return createReadStream(file.path).on('error', () => response.destroy()).pipe(response);
}

/**
 * Serves a folder to this machine alone.
 * @param {number} port first port tried, each next one if it is taken; 0 for any free one
 * @param {string} folder absolute path, without a separator at its end
 * @returns {Promise<{url: string, close: () => Promise<void>}>}
 */
export async function serve(port, folder = DIST) {
  const server = createServer((request, response) => answer(request, response, folder));
  for (let at = port; ; at++) {
    const error = await new Promise((done) => {
      server.once('error', done);
      server.listen(at, '127.0.0.1', () => {
        server.off('error', done);
        done(undefined);
      });
    });
    if (!error) break;
    if (error.code !== 'EADDRINUSE' || at - port >= 100) throw error;
  }
  const close = () =>
    new Promise((done) => {
      server.close(() => done());
      server.closeAllConnections();
    });
  return { url: `http://localhost:${server.address().port}/`, close };
}
