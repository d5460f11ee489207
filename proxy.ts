import { type NextRequest, NextResponse } from 'next/server';
import { env } from '@/lib/env';

const A_YEAR = 365 * 24 * 3600;

/** Scripts run only with this request's nonce, and what those load. Development needs eval and unmarked styles to reload. */
function contentPolicy(nonce: string, development: boolean): string {
  const scripts = `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`;
  const styles = development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`;
  return [
    "default-src 'self'",
    scripts,
    styles,
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
    "form-action 'self'",
  ].join('; ');
}

export function proxy(request: NextRequest) {
  const settings = env();
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString('base64');
  const policy = contentPolicy(nonce, settings.NODE_ENV === 'development');
  const headers = new Headers(request.headers);
  // The framework reads the nonce from here and puts it on its own scripts.
  headers.set('content-security-policy', policy);
  // Always written here, whatever came in: where a sign-in leads back to (app/_server/context.ts).
  headers.set('x-loamline-page', request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  if (settings.APP_ORIGIN.startsWith('https:')) {
    response.headers.set('strict-transport-security', `max-age=${A_YEAR}; includeSubDomains`);
  }
  return response;
}

export const config = {
  // The routes of the API stay out: a request that passes here has its body cut at 10 MB, and answers that are data need no nonce.
  matcher: ['/((?!api/|_next/static/|_next/image|icon\\.svg|pdf\\.worker\\.min\\.mjs).*)'],
};
