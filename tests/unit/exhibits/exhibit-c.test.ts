import { createHash } from 'node:crypto'
import JSZip from 'jszip'
import { beforeAll, describe, expect, it } from 'vitest'
import { demoDesigns, demoWeather } from '@/db/demo/designs'
import { renderExhibitC } from '@/lib/documents/exhibit-c'
import type { ExhibitSource } from '@/lib/domain/exhibits'
import { figuresOf } from '@/lib/domain/plant/design'
import { designRunner } from '@/lib/domain/plant/design-year'
import { syntheticYear } from '@/lib/domain/plant/synthetic-year'

const made = syntheticYear(demoWeather.mountain)
if (!made.ok) throw new Error('The synthetic year of the demo cannot be made.')
const runner = designRunner(made.year)
const revisions = demoDesigns[0]!.revisions

function sourceOf(designNo: number, no: number): ExhibitSource {
  const design = revisions[designNo - 1]!.body
  return {
    no,
    weatherName: 'Synthetic year, Sorrel Wells',
    design,
    result: runner.run(design),
    data: {
      project: { name: 'Juniper Flat', town: 'Sorrel Wells', latitude: 39.41, longitude: -111.1 },
      requestNo: 'AVE-26C-014',
      operator: { name: 'Averill Valley Electric', zone: 'America/Denver' },
      terms: { poi: '69 kV bus, Sorrel Wells', poiVoltageKv: 69, poiMw: 48 },
      calculation: {
        no: designNo,
        sha256: createHash('sha256').update(String(designNo)).digest('hex'),
        recordedOn: '2026-11-12',
        engineVersion: 'plant-1',
      },
      design: { no: designNo, recordedOn: '2026-11-10' },
      weatherReason: 'application estimate; no station file within 40 km',
      what: 'Inverters of 4.2 MVA',
      prepared: { name: 'First Engineer', on: '2026-11-27' },
      checked: { name: 'Second Engineer', on: '2026-11-30' },
      checkNotes: 'not for print',
      earlier: [
        {
          no: 1,
          on: '2026-05-12',
          preparedBy: 'First Engineer',
          checkedBy: 'Second Engineer',
          wasIssued: true,
          what: 'First issue',
        },
      ],
      comparedWithId: null,
    },
  }
}

const before = sourceOf(3, 1)
const source = sourceOf(4, 2)

async function partsOf(bytes: Uint8Array) {
  const zip = await JSZip.loadAsync(bytes)
  const part = (name: string) => zip.file(name)!.async('string')
  return { zip, part, document: await part('word/document.xml') }
}

/** Text as a reader sees it: no-break spaces and hyphens as plain ones. */
const textOf = (xml: string) =>
  xml
    .replace(/<\/w:p>/g, '\n')
    .replace(/<[^>]+>/g, '')
    .replaceAll('\u00a0', ' ')
    .replaceAll('\u2011', '-')
    .replaceAll('&amp;', '&')
    .replaceAll('&lt;', '<')

// Written anew here, so that a wrong figure of the template cannot agree with itself.
const grouped = (value: number, digits: number) =>
  value.toLocaleString('en-US', { minimumFractionDigits: digits, maximumFractionDigits: digits })
const energy = (kwh: number) =>
  kwh >= 1e7 ? `${grouped(kwh / 1e6, 1)} GWh` : `${grouped(kwh / 1e3, kwh < 1e4 ? 1 : 0)} MWh`

let bytes: Uint8Array
let parts: Awaited<ReturnType<typeof partsOf>>
let text: string

beforeAll(async () => {
  bytes = await renderExhibitC(source, before)
  parts = await partsOf(bytes)
  text = textOf(parts.document)
})

describe('the document of exhibit C', () => {
  it('holds every figure of the year', () => {
    const { annual, nextMwdcKwh, subHourly } = source.result
    const figures = [
      '62.39 MWdc',
      '48.0 MWac',
      grouped(annual.dcPerPoiKw!, 2),
      grouped(annual.dcPerInverterKw, 2),
      `${grouped(figuresOf(source.design).needed.inverterKva / 1000, 1)} MVA`,
      `${grouped(annual.curtailedFraction * 100, 1)} % a year`,
      `${energy(annual.poiCurtailedKwh)} in ${annual.hoursAtPoiLimit} hours`,
      `${grouped(annual.limitedFraction * 100, 1)} % a year`,
      energy(annual.acUnclippedKwh),
      `${energy(annual.exportKwh)} a year`,
      `${grouped(annual.acCapacityFactor * 100, 1)} %`,
      `${grouped(annual.poaKwhPerM2, 0)} kWh/m²`,
      `${grouped(nextMwdcKwh / 1000, 0)} MWh`,
      `${subHourly.lowPoints.toFixed(1)} to ${subHourly.highPoints.toFixed(1)} points`,
    ]
    expect(figures.filter((figure) => !text.includes(figure))).toEqual([])
  })

  it('holds every month', () => {
    const lines = text.split('\n')
    const months = lines.slice(lines.indexOf('Jan'), lines.indexOf('Year') + 8)
    for (const month of source.result.monthly)
      for (const kwh of [month.atPoiKwh, month.exportKwh])
        expect(months).toContain(grouped(kwh / 1000, 0))
    expect(months).toContain(grouped(source.result.annual.exportKwh / 1000, 0))
  })

  it('names every method with its source, and the constants of the design', () => {
    const named = source.result.methods.flatMap((one) => [one.step, one.method, one.source])
    expect(named.filter((words) => !text.includes(words))).toEqual([])
    for (const words of ['u0 25, u1 6.84', 'nominal efficiency 98.7 %', '−0.30 % per °C'])
      expect(text).toContain(words)
  })

  it('names every element of the plant and every loss', () => {
    const { module, inverter, transformers, dcLosses } = source.design
    const names = [module, inverter, ...transformers, ...dcLosses].map((one) => one.name)
    expect(names.filter((name) => !text.includes(name))).toEqual([])
  })

  it('says what the estimate does not know, where the weather comes from, and how far away', () => {
    expect(text).toContain('hourly data understate clipping')
    expect(text).toContain('synthetic year made from twelve monthly means')
    expect(text).toContain('no station file within 40 km')
    expect(text).toMatch(/8\.\d km \(5\.\d miles\) from the project/)
  })

  it('carries caution, signatures, revisions and the whole hash of the calculation', () => {
    expect(text).toContain('A licensed engineer has to review it')
    expect(text).toContain('the utility’s requirements and local code come first')
    expect(text).toContain('Second Engineer, 30 Nov 2026')
    expect(text).toContain('First issue')
    expect(text).toContain(source.data.calculation.sha256)
    expect(text).not.toContain('not for print')
  })

  it('marks what differs from the revision issued before, and nothing else', () => {
    const words = /A bar at the left marks what differs from revision 1[^:]*: ([^\n]*)\./.exec(text)
    const marked = words?.[1]?.split('; ') ?? []
    expect(marked).toContain('Inverters')
    expect(marked).toContain('Energy at the POI')
    expect(marked).not.toContain('PV array')
    expect(marked).not.toContain('Main transformer')
    expect(parts.document.match(/w:fill="B2501B"/g)).toHaveLength(marked.length)
  })

  it('stands on US Letter with page fields, the exhibit and the short hash in its foot', async () => {
    expect(parts.document).toMatch(
      /<w:pgSz[^>]*w:w="12240"[^>]*w:h="15840"|<w:pgSz[^>]*w:h="15840"[^>]*w:w="12240"/,
    )
    const foot = await parts.part('word/footer1.xml')
    expect(foot).toContain('NUMPAGES')
    const { sha256 } = source.data.calculation
    expect(foot).toContain(`calculation no. 4, sha256 ${sha256.slice(0, 4)}…${sha256.slice(-4)}`)
    expect(foot).toContain('Exhibit C, revision 2')
  })

  it('holds four pictures as outlines with a PNG of three times the size, each with its words', async () => {
    const names = Object.keys(parts.zip.files)
    expect(names.filter((name) => name.endsWith('.svg'))).toHaveLength(4)
    expect(names.filter((name) => name.endsWith('.png'))).toHaveLength(4)
    const svg = await parts.part('word/media/image1.svg')
    expect(svg).not.toContain('<text')
    const png = await parts.zip.file('word/media/image1.png')!.async('nodebuffer')
    expect(png.readUInt32BE(16)).toBeGreaterThanOrEqual(3 * 672)
    expect(parts.document.match(/<wp:docPr [^>]*descr="[^"]{40,}"/g)).toHaveLength(4)
  })

  it('names the fonts with what stands in for them', async () => {
    const fonts = await parts.part('word/fontTable.xml')
    expect(fonts).toMatch(/Archivo"><w:altName w:val="Arial"/)
    expect(fonts).toMatch(/Chivo Mono"><w:altName w:val="Courier New"/)
  })
})

describe('the bytes', () => {
  it('are the same on every run', async () => {
    expect(await renderExhibitC(source, before)).toEqual(bytes)
  })

  it('carry the day of the revision and no clock', async () => {
    expect(await parts.part('docProps/core.xml')).toContain('2026-11-30T12:00:00Z')
    const days = Object.values(parts.zip.files).map((file) => file.date.toISOString())
    expect(new Set(days)).toEqual(new Set(['2026-11-30T12:00:00.000Z']))
  })
})

describe('a draft', () => {
  it('says on every page that it is not checked', async () => {
    const draft = { ...source, data: { ...source.data, checked: null } }
    const { part, document } = await partsOf(await renderExhibitC(draft, null))
    for (const name of ['word/header1.xml', 'word/header2.xml'])
      expect(await part(name)).toContain('Draft, not checked')
    expect(textOf(document)).toContain('not yet')
    expect(document).not.toContain('w:fill="B2501B"')
  })
})
