/** On every answer: pages, routes, files, refusals. The content policy of pages needs a nonce and is made in proxy.ts. */
const HEADERS = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'Referrer-Policy', value: 'strict-origin-when-cross-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
  {
    key: 'Permissions-Policy',
    value:
      'accelerometer=(), camera=(), display-capture=(), geolocation=(), gyroscope=(), microphone=(), payment=(), usb=()',
  },
];
/** Pages whose address holds a secret tell no other page where the visitor came from. */
const SECRET_PAGES = '/:door(verify|reset|invitation|reminder|unsubscribe)/:rest*';

/** @type {import('next').NextConfig} */
export default {
  headers: async () => [
    { source: '/:path*', headers: HEADERS },
    { source: SECRET_PAGES, headers: [{ key: 'Referrer-Policy', value: 'no-referrer' }] },
  ],
  poweredByHeader: false,
  reactStrictMode: true,
  productionBrowserSourceMaps: false,
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ['pdfjs-dist', '@node-rs/argon2', 'postgres', 'pg', 'pg-boss'],
};
