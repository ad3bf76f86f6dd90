process.env.NEXT_TELEMETRY_DISABLED ??= '1';

/** @type {import('next').NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  // knex looks for every database driver it knows; bundling it would ask for all of them.
  serverExternalPackages: ['knex'],
  turbopack: { root: import.meta.dirname },
  outputFileTracingRoot: import.meta.dirname,
};

export default config;
