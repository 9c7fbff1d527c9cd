/**
 * Serves the built page to this machine alone: files of one folder, read into memory once, under headers that let nothing
 * in and nothing out. A case that was named on the command line is served beside them.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { createServer, type Server, type ServerResponse } from 'node:http';
import { extname, join, relative, sep } from 'node:path';
import { gzipSync } from 'node:zlib';

/** What a page may load: itself. Styles are written by lit and plotly into the page. */
const CONTENT_SECURITY_POLICY =
  "default-src 'self'; style-src 'self' 'unsafe-inline'; img-src 'self' data: blob:; worker-src 'self'; " +
  "object-src 'none'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'";

const HEADERS = {
  'Content-Security-Policy': CONTENT_SECURITY_POLICY,
  'X-Content-Type-Options': 'nosniff',
  'Referrer-Policy': 'no-referrer',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
} as const;

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
};

/** Where the page finds the case that was named; 404 when none was. */
const CASE_ADDRESS = '/case.json';

interface Page {
  readonly body: Buffer;
  readonly zipped: Buffer;
  readonly type: string;
  /** Names of built parts carry a hash of what is in them. */ readonly isLasting: boolean;
}

/**
 * A server of a folder, not yet listening.
 *
 * @param folder - The built page.
 * @param caseFile - Name and text of a case, made anew for each request.
 */
export function createPageServer(
  folder: string,
  caseFile?: () => { readonly name: string; readonly text: string },
): Server {
  const pages = new Map<string, Page>();
  for (const entry of readdirSync(folder, { recursive: true, withFileTypes: true })) {
    if (!entry.isFile()) continue;
    const path = join(entry.parentPath, entry.name);
    const body = readFileSync(path);
    const address = `/${relative(folder, path).split(sep).join('/')}`;
    const type = TYPES[extname(path)] ?? 'application/octet-stream';
    pages.set(address, { body, zipped: gzipSync(body), type, isLasting: address.startsWith('/assets/') });
  }
  return createServer((request, response) => {
    const address = (request.url ?? '/').split('?')[0] ?? '/';
    if (!isLocal(request.headers.host)) {
      refuse(response, 403);
    } else if (request.method !== 'GET' && request.method !== 'HEAD') {
      refuse(response, 405);
    } else if (address === CASE_ADDRESS && caseFile !== undefined) {
      const text = JSON.stringify(caseFile());
      response.writeHead(200, { ...HEADERS, 'Content-Type': TYPES['.json'], 'Cache-Control': 'no-store' }).end(text);
    } else {
      const page = pages.get(address === '/' ? '/index.html' : address);
      if (page === undefined) {
        refuse(response, 404);
        return;
      }
      const zips = /\bgzip\b/.test(String(request.headers['accept-encoding']));
      response.writeHead(200, {
        ...HEADERS,
        'Content-Type': page.type,
        'Cache-Control': page.isLasting ? 'public, max-age=31536000, immutable' : 'no-cache',
        Vary: 'Accept-Encoding',
        ...(zips ? { 'Content-Encoding': 'gzip' } : {}),
      });
      response.end(request.method === 'HEAD' ? undefined : zips ? page.zipped : page.body);
    }
  });
}

/** A page of another name that is led here by its name server is turned away. */
function isLocal(host: string | undefined): boolean {
  return /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/.test(host ?? '');
}

function refuse(response: ServerResponse, code: number): void {
  response.writeHead(code, { ...HEADERS, 'Content-Type': 'text/plain; charset=utf-8' }).end(`${code}\n`);
}
