import type { NextConfig } from 'next'

const config: NextConfig = {
  distDir: process.env.LINESIDE_DIST_DIR ?? '.local/next-dev',
  poweredByHeader: false,
  reactStrictMode: true,
  serverExternalPackages: ['@node-rs/argon2', 'graphile-worker', 'pg', 'pino', '@resvg/resvg-js'],
  turbopack: { root: import.meta.dirname },
}

export default config
