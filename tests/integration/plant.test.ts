import { randomUUID } from 'node:crypto'
import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { eq, sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { GET as getHours } from '@/app/api/weather/[id]/hours/route'
import { POST as postWeather } from '@/app/api/weather/route'
import { POST as postEstimate } from '@/app/api/plant/estimate/route'
import { POST as postStrings } from '@/app/api/plant/strings/route'
import { applications } from '@/db/schema/applications'
import { files } from '@/db/schema/correspondence'
import { calculations, weather } from '@/db/schema/plant'
import { demoDesigns, demoWeather } from '@/db/demo/designs'
import { plantOf } from '@/lib/domain/plant/design'
import { designRunner } from '@/lib/domain/plant/design-year'
import { unpackWeather } from '@/lib/domain/plant/weather-bytes'
import type { WeatherYear } from '@/lib/domain/plant/weather-year'
import { estimateYear } from '@/lib/domain/plant/year'
import { calculationSchema, type DesignBody } from '@/lib/schemas/design'
import { estimateResult } from '@/lib/schemas/plant-result'
import { weatherLimitBytes, weatherSchema, type Weather } from '@/lib/schemas/weather'
import { freezeCalculation, getCalculation, listCalculations } from '@/lib/services/calculations'
import { listDesignRevisions, reviseDesign } from '@/lib/services/designs'
import { createSyntheticWeather, getWeatherYear } from '@/lib/services/weather'
import { createBareApplication, createBareUtility } from '../setup/bare-application'
import { useTestDatabase } from '../setup/database'
import { createSignedPerson, type SignedPerson } from '../setup/person'
import { isMissing, MISSING_NOTE, weatherPath } from '../reference/plant/reference-files'
import { synthetic, tmy3Lines } from '../unit/plant/weather-texts'

const database = useTestDatabase()

let folder: string
let engineer: SignedPerson
let executive: SignedPerson

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lineside-weather-'))
  process.env.FILES_DIR = folder
  engineer = await createSignedPerson(['engineer'])
  executive = await createSignedPerson(['executive'])
})
afterAll(() => rm(folder, { recursive: true, force: true }))

const noParams = { params: Promise.resolve({}) }

interface Problem {
  status: number
  code: string
  fields: { path: string; message: string }[]
}

function upload(bytes: Uint8Array | string, headers: Record<string, string> = {}) {
  const body = typeof bytes === 'string' ? new TextEncoder().encode(bytes) : bytes
  const request = new Request('http://lineside.test/api/weather', {
    method: 'POST',
    headers: { ...engineer.headers, 'x-file-name': 'station.csv', ...headers },
    body: new Blob([body as Uint8Array<ArrayBuffer>]).stream(),
    duplex: 'half',
  } as RequestInit)
  return postWeather(request, noParams)
}

function post(
  handler: (
    request: Request,
    next: { params: Promise<Record<string, string>> },
  ) => Promise<Response>,
  body: unknown,
) {
  const request = new Request('http://lineside.test/', {
    method: 'POST',
    headers: { ...engineer.headers, 'content-type': 'application/json' },
    body: JSON.stringify(body),
  })
  return handler(request, noParams)
}

/** Bytes kept in the store, rows of files and of weather years. */
async function kept() {
  const db = database().db
  const stored = existsSync(folder)
    ? readdirSync(folder, { recursive: true, withFileTypes: true }).filter((one) => one.isFile())
    : []
  return {
    stored: stored.length,
    files: await db.$count(files),
    weather: await db.$count(weather),
  }
}

const lines = tmy3Lines(synthetic())
const cell = (row: string, column: number, value: string) =>
  row.split(',').with(column, value).join(',')
/** A bitmap's first bytes and noise that is no text. */
const picture = Uint8Array.from({ length: 40_000 }, (_, i) =>
  i < 8 ? [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a][i]! : (i * 73) % 256,
)

describe('a weather file', () => {
  it('is read, reported and kept once, however often its bytes come', async () => {
    const first = await upload(lines.join('\n'))
    expect(first.status).toBe(201)
    const year = weatherSchema.parse(await first.json())
    expect(year.kind).toBe('tmy3')
    expect(year.report.rowsRead).toBe(8760)
    expect(year.report.gaps).toEqual([])
    expect(year.report.closure.agrees).toBe(true)
    const again = weatherSchema.parse(await (await upload(lines.join('\n'))).json())
    expect(again.id).toBe(year.id)
    expect(await database().db.$count(weather)).toBe(1)
  })

  it.each([
    {
      name: 'cut off in the middle',
      bytes: lines.slice(0, 4000).join('\n'),
      says: /8760|8,760/,
    },
    { name: 'one hour short', bytes: lines.slice(0, -1).join('\n'), says: /8759|8,759/ },
    {
      name: 'with GHI and DNI exchanged',
      bytes: [
        ...lines.slice(0, 2),
        ...lines.slice(2).map((row) => {
          const cells = row.split(',')
          return row.split(',').with(2, cells[4]!).with(4, cells[2]!).join(',')
        }),
      ].join('\n'),
      says: /GHI and DNI exchanged/,
    },
    {
      name: 'with a value that cannot be',
      bytes: lines.map((row, i) => (i === 4321 ? cell(row, 2, '99999') : row)).join('\n'),
      says: /4322.*99999|99999.*4322/s,
    },
    {
      name: 'with a word where a number stands',
      bytes: lines.map((row, i) => (i === 99 ? cell(row, 8, 'warm') : row)).join('\n'),
      says: /100.*warm|warm.*100/s,
    },
    { name: 'that is a picture named .csv', bytes: picture, says: /binary/ },
  ])('$name is refused with what was found, and nothing of it is kept', async ({ bytes, says }) => {
    const before = await kept()
    const response = await upload(bytes)
    const problem = (await response.json()) as Problem
    expect(response.status).toBe(422)
    const messages = problem.fields.map((field) => `${field.path} ${field.message}`).join('\n')
    expect(messages).toMatch(says)
    expect(messages).toMatch(/allowed|expected|needed/i)
    expect(await kept()).toEqual(before)
  })

  it('above 20 MB is refused before its bytes are read', async () => {
    const before = await kept()
    let pulled = 0
    const request = new Request('http://lineside.test/api/weather', {
      method: 'POST',
      headers: {
        ...engineer.headers,
        'x-file-name': 'large.csv',
        'content-length': String(10 * weatherLimitBytes),
      },
      body: new ReadableStream(
        {
          pull(controller) {
            pulled += 1
            controller.enqueue(new Uint8Array(65_536))
          },
        },
        { highWaterMark: 0 },
      ),
      duplex: 'half',
    } as RequestInit)
    expect((await postWeather(request, noParams)).status).toBe(413)
    expect(pulled).toBe(0)
    expect(await kept()).toEqual(before)
  })

  it('above 20 MB that states no length is refused while its bytes pass', async () => {
    const before = await kept()
    const response = await upload(new Uint8Array(weatherLimitBytes + 1))
    expect(response.status).toBe(413)
    expect(await kept()).toEqual(before)
  })

  it('is for engineers and developers to bring, and for all to see', async () => {
    const request = new Request('http://lineside.test/api/weather', {
      method: 'POST',
      headers: { ...executive.headers, 'x-file-name': 'station.csv' },
      body: lines.join('\n'),
    })
    expect((await postWeather(request, noParams)).status).toBe(403)
  })

  const saltLake = weatherPath('725720TYA.CSV')
  it.skipIf(isMissing(saltLake))(
    `with one hour that cannot be right is kept and the hour is named ${MISSING_NOTE}`,
    async () => {
      const response = await upload(readFileSync(saltLake), { 'x-file-name': '725720TYA.CSV' })
      const year = weatherSchema.parse(await response.json())
      expect(year.report.defectHours.length).toBeGreaterThan(0)
      expect(year.report.warnings.join('\n')).toContain(year.report.defectHours[0]!.message)
    },
  )
})

describe('the hours of a weather year', () => {
  it('reach a browser bit for bit', async () => {
    const year = await keepMountain()
    const request = new Request('http://lineside.test/', { headers: executive.headers })
    const answer = await getHours(request, { params: Promise.resolve({ id: year.id }) })
    const sent = unpackWeather(await answer.arrayBuffer())
    expect(sent).toEqual((await getWeatherYear(engineer.ctx(), year.id)).year)
  })
})

const juniper = demoDesigns[0]!.revisions.at(-1)!.body
const keepMountain = (): Promise<Weather> =>
  createSyntheticWeather(engineer.ctx(), demoWeather.mountain)

async function makeProject() {
  const { id } = await createBareApplication(await createBareUtility())
  const [row] = await database().db.select().from(applications).where(eq(applications.id, id))
  return { applicationId: id, projectId: row!.projectId }
}

async function makeDesign(body: DesignBody = juniper) {
  const place = await makeProject()
  const { id: weatherId } = await keepMountain()
  const input = { id: randomUUID(), baseNo: 0, body, weatherId }
  const revision = await reviseDesign(engineer.ctx(), place.projectId, input)
  return { ...place, weatherId, revision, input }
}

describe('a design', () => {
  it('gains revisions; the same form twice is one, and a stale one is refused', async () => {
    const { projectId, revision, input } = await makeDesign()
    expect(revision.no).toBe(1)
    expect((await reviseDesign(engineer.ctx(), projectId, input)).id).toBe(revision.id)
    const next = { ...input, id: randomUUID(), baseNo: 1, body: { ...juniper, strings: 4400 } }
    expect((await reviseDesign(engineer.ctx(), projectId, next)).no).toBe(2)
    const stale = { ...next, id: randomUUID() }
    await expect(reviseDesign(engineer.ctx(), projectId, stale)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('revision 2') as string,
    })
    const all = await listDesignRevisions(executive.ctx(), projectId)
    expect(all.map((one) => [one.no, one.body.strings])).toEqual([
      [2, 4400],
      [1, 4303],
    ])
  })

  it('of two writers who start from the same revision takes one', async () => {
    const { projectId, input } = await makeDesign()
    const tries = [4000, 4100].map((strings) =>
      reviseDesign(engineer.ctx(), projectId, {
        ...input,
        id: randomUUID(),
        baseNo: 1,
        body: { ...juniper, strings },
      }),
    )
    const settled = await Promise.allSettled(tries)
    expect(settled.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
  })
})

describe('a frozen calculation', () => {
  it('holds the figures that the page showed, to the last bit', async () => {
    const { applicationId, weatherId, revision } = await makeDesign()
    const input = { id: randomUUID(), designRevisionId: revision.id }
    const frozen = await freezeCalculation(engineer.ctx(), applicationId, input)
    const request = new Request('http://lineside.test/', { headers: engineer.headers })
    const hours = await getHours(request, { params: Promise.resolve({ id: weatherId }) })
    const live = designRunner(unpackWeather(await hours.arrayBuffer())).run(juniper)
    const read = await getCalculation(executive.ctx(), applicationId, 1)
    expect(read.result).toEqual(JSON.parse(JSON.stringify(live)))
    expect(read.result.annual.exportKwh).toBe(live.annual.exportKwh)
    expect(calculationSchema.parse(read)).toEqual(frozen)
  })

  it('is numbered by application, and the same id again is the same calculation', async () => {
    const { applicationId, revision } = await makeDesign()
    const input = { id: randomUUID(), designRevisionId: revision.id }
    const [one, same] = await Promise.all([
      freezeCalculation(engineer.ctx(), applicationId, input),
      freezeCalculation(engineer.ctx(), applicationId, input),
    ])
    expect(same).toEqual(one)
    const other = { ...input, id: randomUUID() }
    expect((await freezeCalculation(engineer.ctx(), applicationId, other)).no).toBe(2)
    const all = await listCalculations(executive.ctx(), applicationId)
    expect(all.map(({ no }) => no)).toEqual([2, 1])
    expect(all[0]!.sha256).toBe(all[1]!.sha256)
  })

  it('cannot be changed or taken away by the application', async () => {
    const { applicationId, revision } = await makeDesign()
    const input = { id: randomUUID(), designRevisionId: revision.id }
    await freezeCalculation(engineer.ctx(), applicationId, input)
    const { db } = database()
    const change = db.update(calculations).set({ no: 9 }).where(eq(calculations.id, input.id))
    await expect(change).rejects.toMatchObject({
      cause: { message: expect.stringMatching(/permission denied/) as string },
    })
    const removal = db.execute(sql`delete from design_revisions where id = ${revision.id}`)
    await expect(removal).rejects.toThrow()
    expect((await getCalculation(engineer.ctx(), applicationId, 1)).no).toBe(1)
  })

  it('takes only a revision of its own project with a weather year, and only from an engineer', async () => {
    const mine = await makeDesign()
    const other = await makeProject()
    const input = { id: randomUUID(), designRevisionId: mine.revision.id }
    await expect(
      freezeCalculation(engineer.ctx(), other.applicationId, input),
    ).rejects.toMatchObject({ code: 'invalid' })
    const bare = await reviseDesign(engineer.ctx(), other.projectId, {
      id: randomUUID(),
      baseNo: 0,
      body: juniper,
    })
    await expect(
      freezeCalculation(engineer.ctx(), other.applicationId, {
        id: randomUUID(),
        designRevisionId: bare.id,
      }),
    ).rejects.toMatchObject({ code: 'invalid' })
    await expect(
      freezeCalculation(executive.ctx(), mine.applicationId, input),
    ).rejects.toMatchObject({ code: 'forbidden' })
  })
})

describe('the fixed doors', () => {
  it('estimate a plant on a kept year and on the text of a file alike', async () => {
    const text = lines.join('\n')
    const { id } = weatherSchema.parse(await (await upload(text)).json())
    const plant = plantOf(juniper)
    const answers = await Promise.all(
      [{ id }, { text, fileName: 'station.csv' }].map(async (from) =>
        estimateResult.parse(await (await post(postEstimate, { weather: from, plant })).json()),
      ),
    )
    expect(answers[0]).toEqual(answers[1])
    const year: WeatherYear = (await getWeatherYear(engineer.ctx(), id)).year
    expect(answers[0]!.annual).toEqual(estimateYear(year, plant).annual)
  })

  it('tell every wrong field of a plant, and a file that is none', async () => {
    const plant = { ...plantOf(juniper), dcKw: -1, inverterEfficiency: 98.7 }
    const wrong = await post(postEstimate, { weather: { id: randomUUID() }, plant })
    expect(wrong.status).toBe(422)
    const paths = ((await wrong.json()) as Problem).fields.map((field) => field.path)
    expect(paths).toEqual(expect.arrayContaining(['plant.dcKw', 'plant.inverterEfficiency']))
    const noFile = await post(postEstimate, {
      weather: { text: 'a,b\n1,2', fileName: 'x.csv' },
      plant: plantOf(juniper),
    })
    expect(noFile.status).toBe(422)
    const unknown = await post(postEstimate, {
      weather: { id: randomUUID() },
      plant: plantOf(juniper),
    })
    expect(((await unknown.json()) as Problem).fields[0]!.path).toBe('weather.id')
  })

  it('size a string by its coldest and hottest day', async () => {
    // Source: demo-scenario.md section 3 (25 in series give 1,448.0 V at -24 C; at least 24).
    const answer = await post(postStrings, {
      vocV: 51.6,
      vmpV: 43.3,
      betaVocPctPerC: -0.25,
      betaVmpPctPerC: -0.3,
      tMinC: -24,
      tCellHotC: 70,
      systemMaxV: 1500,
      trackingMinV: 880,
    })
    expect(await answer.json()).toMatchObject({ maxModules: 25, minModules: 24 })
  })
})
