import type { NextConfig } from 'next';

const nextConfig: NextConfig = {
  poweredByHeader: false,
  // next dev otherwise prints every server action's arguments, passwords included
  logging: { serverFunctions: false },
  // types are a step of their own (npm run typecheck), faster than inside the build
  typescript: { ignoreBuildErrors: true },
  // pinned: Next guesses a parent folder when it finds another lockfile above
  turbopack: { root: import.meta.dirname },
  outputFileTracingRoot: import.meta.dirname,
  // a section document of the greatest size, as text inside an action's arguments
  experimental: { serverActions: { bodySizeLimit: '3mb' } },
  // start their own threads from files on disk, so the bundler must leave them alone
  serverExternalPackages: ['piscina'],
};

export default nextConfig;
