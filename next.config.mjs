/** What every answer carries beside the content security policy, which `proxy.ts` makes new for each request. */
const SECURITY_HEADERS = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
  {
    key: 'Permissions-Policy',
    value: 'accelerometer=(), camera=(), geolocation=(), gyroscope=(), microphone=(), payment=(), usb=()',
  },
];

/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  // Sequelize looks for every driver it could have; bundled, the build fails on those that are not installed.
  serverExternalPackages: ['sequelize', 'mariadb', 'pino', '@node-rs/argon2'],
  turbopack: { root: import.meta.dirname },
  // The build would check tests and scripts too, at twice the time; `npm test` checks all of it, and more strictly.
  typescript: { ignoreBuildErrors: true },
  // A sheet of two million characters, and what quoting adds to it on the way.
  experimental: { serverActions: { bodySizeLimit: '4mb' } },
  // Development would print every action's arguments: passwords and whole sheets.
  logging: { serverFunctions: false },
  headers: async () => [{ source: '/:path*', headers: SECURITY_HEADERS }],
};

export default config;
