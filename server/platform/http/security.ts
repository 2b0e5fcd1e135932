import type { Express } from 'express';
import helmet from 'helmet';
import type { Config } from '../../config.ts';

type Settings = Pick<Config, 'https' | 'dev'>;

/**
 * Headers of every answer. All that speaks of HTTPS hangs on the one setting: a house's plain-http network would break otherwise.
 * Style elements stay allowed: dialogs lock scrolling with one. In development Vite's own inline scripts must run.
 */
export function secure(app: Express, config: Settings): void {
  app.disable('x-powered-by');
  app.set('etag', false);
  // A proxy on this machine may say who calls; nobody else may.
  app.set('trust proxy', 'loopback');
  app.use(
    helmet({
      contentSecurityPolicy: config.dev ? false : { useDefaults: false, directives: directives(config.https) },
      strictTransportSecurity: config.https ? { maxAge: 31_536_000, includeSubDomains: false } : false,
      crossOriginOpenerPolicy: config.https ? { policy: 'same-origin' } : false,
      // Meant for HTTPS too: browsers ignore it on plain http with a complaint in the console.
      originAgentCluster: config.https,
      referrerPolicy: { policy: 'same-origin' },
      xFrameOptions: { action: 'deny' },
    }),
  );
}

function directives(https: boolean): Record<string, string[]> {
  return {
    'default-src': ["'self'"],
    'script-src': ["'self'"],
    'style-src': ["'self'", "'unsafe-inline'"],
    'img-src': ["'self'", 'data:'],
    'connect-src': ["'self'"],
    'object-src': ["'none'"],
    'base-uri': ["'none'"],
    'form-action': ["'self'"],
    'frame-ancestors': ["'none'"],
    ...(https ? { 'upgrade-insecure-requests': [] } : {}),
  };
}
