import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * Headers that keep a page of ours to itself. Everything it loads comes from us, nothing is inline: styles that
 * scripts set through the object model need no exception. The live connection is named for browsers in which 'self'
 * does not cover WebSockets.
 */
export function setSecurityHeaders(publicUrl: string): RequestHandler {
  const isSecure = publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'"],
        imgSrc: ["'self'"],
        fontSrc: ["'self'"],
        manifestSrc: ["'self'"],
        connectSrc: ["'self'", publicUrl.replace(/^http/, 'ws')],
        formAction: ["'self'"],
        baseUri: ["'none'"],
        frameAncestors: ["'none'"],
        ...(isSecure ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: isSecure ? { maxAge: 31_536_000 } : false,
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'same-origin' },
    xFrameOptions: { action: 'deny' },
  });
}
