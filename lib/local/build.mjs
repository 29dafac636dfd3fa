import { existsSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { run } from './children.mjs'
import { isInUse, joinUsers, oneAtATime } from './lock.mjs'
import { buildsFolder, isUsualFolder, root } from './paths.mjs'
import { say } from './say.mjs'
import { sourceHash } from './sources.mjs'

export const nextBin = 'node_modules/next/dist/bin/next'

// Written when the build has ended well; a build that was killed may leave everything but this.
const finished = (name) => path.join(buildsFolder, name, 'finished')

/** Removes builds of other sources that no living process serves. */
function dropOldBuilds(current) {
  for (const name of readdirSync(buildsFolder)) {
    if (!/^next-[0-9a-f]{16}$/.test(name) || name === current) continue
    if (isInUse(name)) continue
    rmSync(path.join(buildsFolder, name), { recursive: true, force: true })
    rmSync(path.join(buildsFolder, `${name}.users`), { recursive: true, force: true })
  }
}

/**
 * The production build of the present sources, made only where there is none: its folder carries
 * their hash, so a running server never sees its build change.
 * @returns the dist folder relative to the root, to be handed on as LINESIDE_DIST_DIR
 */
export async function ensureBuild() {
  return oneAtATime('next-build', async () => {
    const name = `next-${sourceHash()}`
    const distDir = `.local/${name}`
    joinUsers(name)
    if (isUsualFolder) dropOldBuilds(name)
    if (existsSync(finished(name))) return distDir
    say('Building (about a minute) ...')
    rmSync(path.join(root, distDir), { recursive: true, force: true })
    const env = { LINESIDE_DIST_DIR: distDir, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' }
    await run('build', [nextBin, 'build'], { env })
    writeFileSync(finished(name), '')
    return distDir
  })
}
