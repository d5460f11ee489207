/** @type {import('next').NextConfig} */
export default {
  poweredByHeader: false,
  reactStrictMode: true,
  productionBrowserSourceMaps: false,
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: ['@napi-rs/canvas', 'pdfjs-dist', '@node-rs/argon2', 'postgres', 'pg', 'pg-boss'],
};
