import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import express, { type RequestHandler } from 'express';

/** Headers that browsers obey on documents alone: on each of thirty scripts they only weigh. */
const headersOfDocuments = ['Content-Security-Policy', 'Cross-Origin-Opener-Policy',
  'Origin-Agent-Cluster', 'X-DNS-Prefetch-Control', 'X-Download-Options', 'X-Frame-Options',
  'X-Permitted-Cross-Domain-Policies', 'X-XSS-Protection'];

/**
 * The built client: files with a hash in their name are kept for ever, the page itself is asked
 * for anew each time, and every address that is not a file answers with the page.
 */
export function clientFiles(directory: string): RequestHandler[] {
  const root = resolve(directory);
  const page = join(root, 'index.html');
  return [
    express.static(root, {
      index: false,
      setHeaders: (response, path) => {
        const isHashed = /-[A-Z0-9]{8}\.\w+$/.test(path);
        response.set('Cache-Control', isHashed ? 'public, max-age=31536000, immutable'
          : 'public, max-age=300');
        if (!/\.(js|css|woff2)$/.test(path)) return;
        for (const name of headersOfDocuments) response.removeHeader(name);
      },
    }),
    (request, response, next) => {
      if (request.method !== 'GET' && request.method !== 'HEAD') return next();
      if (!existsSync(page)) {
        response.status(503).type('text').send('The client is not built yet: npm run build');
        return;
      }
      response.set('Cache-Control', 'no-cache').sendFile(page);
    },
  ];
}
