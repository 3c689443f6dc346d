/** @type {import('next').NextConfig} */
const config = {
  // The tests build beside the build that may be serving. A build checks the types of what it builds; `npm test` checks the rest.
  distDir: process.env.NEXT_DIST_DIR || '.next',
  typescript: { tsconfigPath: 'tsconfig.build.json' },
  reactStrictMode: true,
  poweredByHeader: false,
  devIndicators: false,
  allowedDevOrigins: ['127.0.0.1'],
  serverExternalPackages: ['knex', 'pg', 'exceljs', 'pino', '@node-rs/argon2', 'nodemailer', 'piscina'],
  headers: async () => [
    {
      source: '/:path*',
      headers: [
        { key: 'X-Content-Type-Options', value: 'nosniff' },
        { key: 'X-Frame-Options', value: 'DENY' },
        { key: 'Content-Security-Policy', value: "base-uri 'self'; form-action 'self'; frame-ancestors 'none'; object-src 'none'" },
        { key: 'Referrer-Policy', value: 'strict-origin-when-cross-origin' },
        { key: 'Permissions-Policy', value: 'microphone=(), geolocation=()' },
      ],
    },
  ],
};

export default config;
