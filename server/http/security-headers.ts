import helmet from 'helmet';
import type { RequestHandler } from 'express';

/**
 * The headers of every answer. Styles may stand inline, since Angular writes component styles into
 * the page; scripts come from this origin only and pass Trusted Types. No
 * `upgrade-insecure-requests`: it would break plain HTTP on a club's own machine.
 */
export function securityHeaders(isHttps: boolean): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'blob:', 'data:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        frameAncestors: ["'none'"],
        formAction: ["'self'"],
        requireTrustedTypesFor: ["'script'"],
        trustedTypes: ['angular', 'angular#components'],
      },
    },
    strictTransportSecurity: isHttps ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'same-origin' },
    xFrameOptions: { action: 'deny' },
  });
}
