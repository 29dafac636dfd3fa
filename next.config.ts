import { existsSync, mkdirSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import type { NextConfig } from 'next'

// Next adds the types of each build folder to the tsconfig it is given. It gets one of its own,
// so that a build leaves the committed file alone.
const tsconfigPath = '.local/tsconfig.next.json'
if (!existsSync(path.join(import.meta.dirname, tsconfigPath))) {
  mkdirSync(path.join(import.meta.dirname, '.local'), { recursive: true })
  const content = { extends: '../tsconfig.json', include: ['../**/*.ts', '../**/*.tsx'] }
  writeFileSync(path.join(import.meta.dirname, tsconfigPath), JSON.stringify(content))
}

const config: NextConfig = {
  distDir: process.env.LINESIDE_DIST_DIR ?? '.local/next-dev',
  // `npm run check` checks the types; a build on a person's machine need not do it again.
  typescript: { tsconfigPath, ignoreBuildErrors: true },
  poweredByHeader: false,
  devIndicators: false,
  reactStrictMode: true,
  serverExternalPackages: ['@node-rs/argon2', 'graphile-worker', 'pg', 'pino', '@resvg/resvg-js'],
  turbopack: { root: import.meta.dirname },
}

export default config
