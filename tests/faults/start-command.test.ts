import { spawn, type ChildProcess } from 'node:child_process'
import { mkdirSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import path from 'node:path'
import { afterAll, afterEach, describe, expect, it } from 'vitest'

const root = path.resolve(import.meta.dirname, '../..')
const local = path.join(root, '.local', `start-${process.pid}`)
const own = ['DATABASE_URL', 'DATABASE_OWNER_URL', 'SMTP_URL', 'NEXTAUTH_URL', 'FILES_DIR', 'PORT']

interface Started {
  child: ChildProcess
  output: () => string
  /** Resolves once the output shows the text; rejects where the command ends first. */
  shows: (text: string) => Promise<void>
  ended: Promise<number | null>
}

const started: Started[] = []

function startCommand(env: Record<string, string> = {}): Started {
  mkdirSync(local, { recursive: true })
  const clean = Object.fromEntries(
    Object.entries(process.env).filter(([name]) => !own.includes(name)),
  )
  const child = spawn(process.execPath, ['lib/local/start.mjs'], {
    cwd: root,
    env: { ...clean, NODE_ENV: 'production', LINESIDE_LOCAL: local, ...env } as NodeJS.ProcessEnv,
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let text = ''
  const heard = new Set<() => void>()
  const hear = (chunk: Buffer) => {
    text += chunk.toString()
    heard.forEach((listen) => listen())
  }
  child.stdout.on('data', hear)
  child.stderr.on('data', hear)
  const ended = new Promise<number | null>((resolve) => child.once('close', resolve))
  const shows = (wanted: string) =>
    new Promise<void>((resolve, reject) => {
      const listen = () => void (text.includes(wanted) && resolve())
      heard.add(listen)
      listen()
      void ended.then(() => reject(new Error(`It ended without saying "${wanted}":\n${text}`)))
    })
  const one = { child, output: () => text, shows, ended }
  started.push(one)
  return one
}

const addressIn = (output: string) => /Lineside is at (\S+)/.exec(output)?.[1] ?? ''

/** Processes whose environment carries our folder: everything the command has started. */
function family(): { pid: number; args: string }[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .flatMap((name) => {
      try {
        const args = readFileSync(`/proc/${name}/cmdline`, 'utf8').replaceAll('\0', ' ')
        const env = readFileSync(`/proc/${name}/environ`, 'utf8')
        const ours = args.includes(local) || env.includes(`LINESIDE_LOCAL=${local}`)
        return ours ? [{ pid: Number(name), args }] : []
      } catch {
        return []
      }
    })
}

afterEach(async () => {
  for (const one of started.splice(0)) {
    one.child.kill('SIGTERM')
    await one.ended
  }
})

afterAll(() => rmSync(local, { recursive: true, force: true }))

describe('npm start', () => {
  it('ends in one block with the address, one sign-in per role and where mail is read', async () => {
    const one = startCommand()
    await one.shows('Ctrl-C stops everything.')
    const health = await fetch(`${addressIn(one.output())}/api/health`)
    expect(await health.json()).toMatchObject({ status: 'ok', database: 'ok' })
    const people = ['developer', 'engineer', 'engineer2', 'liaison', 'executive', 'administrator']
    for (const name of people) expect(one.output()).toContain(`${name}@demo.test`)
    expect(one.output()).toMatch(/Password: DEMO_PASSWORD in \.local\/env\.json/)
    const page = /Mail is read at (\S+)/.exec(one.output())?.[1] ?? ''
    expect((await fetch(page)).status).toBe(200)
  })

  it('refuses a second start of the same checkout in one line', async () => {
    const first = startCommand()
    await first.shows('Ctrl-C stops everything.')
    const second = startCommand()
    expect(await second.ended).toBe(1)
    expect(second.output()).toMatch(
      /^Lineside already runs from this checkout \(process \d+\)\.\n$/,
    )
    expect((await fetch(`${addressIn(first.output())}/api/health`)).status).toBe(200)
  })

  it.each(['SIGTERM', 'SIGINT'] as const)('%s stops everything it started', async (signal) => {
    const one = startCommand()
    await one.shows('Ctrl-C stops everything.')
    const postgres = ({ args }: { args: string }) => args.includes('postgres')
    expect(family().some(postgres)).toBe(true)
    one.child.kill(signal)
    expect(await one.ended).toBe(signal === 'SIGTERM' ? 143 : 130)
    expect(family()).toEqual([])
  })

  it.each(['next', 'maildev', 'worker/send', 'worker/make'])(
    'a killed %s stops everything, and the exit code tells',
    async (name) => {
      const one = startCommand()
      await one.shows('Ctrl-C stops everything.')
      const victim = family().find(({ args }) => args.includes(name))
      expect(victim).toBeDefined()
      process.kill(victim?.pid ?? 0, 'SIGKILL')
      expect(await one.ended).toBe(1)
      expect(one.output()).toMatch(/ended \(SIGKILL\); stopping everything/)
      expect(family()).toEqual([])
    },
  )

  it('a start after the command itself was killed finds its data and goes on', async () => {
    const broken = startCommand()
    await broken.shows('Ctrl-C stops everything.')
    const children = family().filter(({ args }) => /next|maildev|worker/.test(args))
    broken.child.kill('SIGKILL')
    await broken.ended
    for (const { pid } of children) process.kill(pid, 'SIGKILL')
    const again = startCommand()
    await again.shows('Ctrl-C stops everything.')
    expect(again.output()).not.toContain('Filling the empty database')
    again.child.kill('SIGTERM')
    expect(await again.ended).toBe(143)
    expect(family()).toEqual([])
  })

  it('says in one line that the port of PORT is taken', async () => {
    const holder = createServer()
    await new Promise<void>((resolve) => holder.listen(0, '127.0.0.1', resolve))
    const address = holder.address()
    const port = typeof address === 'object' && address ? address.port : 0
    const one = startCommand({ PORT: String(port) })
    expect(await one.ended).toBe(1)
    expect(one.output()).toBe(`Port ${port} is taken. Free it, or start with another PORT.\n`)
    holder.close()
  })

  it.each(['0', '70000', 'web'])('says that PORT=%s is no port', async (port) => {
    const one = startCommand({ PORT: port })
    expect(await one.ended).toBe(1)
    expect(one.output()).toContain(`PORT is "${port}"; a port is a whole number from 1 to 65535.`)
  })
})
