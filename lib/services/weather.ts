import { readFile } from 'node:fs/promises'
import { desc, eq } from 'drizzle-orm'
import { weather } from '@/db/schema/plant'
import { syntheticYear } from '@/lib/domain/plant/synthetic-year'
import { readWeather } from '@/lib/domain/plant/weather'
import { packWeather } from '@/lib/domain/plant/weather-bytes'
import type {
  WeatherIssue,
  WeatherReport,
  WeatherResult,
  WeatherYear,
} from '@/lib/domain/plant/weather-year'
import { getFileStore } from '@/lib/files/store'
import { syntheticYearInput, type SyntheticYearInput } from '@/lib/schemas/plant'
import { weatherLimitBytes, type Weather } from '@/lib/schemas/weather'
import { recordAudit } from '@/lib/services/audit'
import { actorId, authorize, type Context } from '@/lib/services/context'
import { notFound, ServiceError, type FieldError } from '@/lib/services/errors'
import { keepFile, uploadFile } from '@/lib/services/files'
import { isUuid } from '@/lib/services/uuid'

interface ReadYear {
  year: WeatherYear
  report: WeatherReport
}

/**
 * Receives a TMY3 or EPW file as the raw body, up to 20 MB. It is read inside the request: that
 * takes about 40 ms, and the sender waits for the refusal or the report either way. The bytes are
 * read before they are kept, so that nothing of a wrong file remains; the same bytes are one year.
 * @throws ServiceError `too_large`, `unreadable`, or `invalid` with row, column, found and allowed.
 */
export async function uploadWeather(ctx: Context, request: Request): Promise<Weather> {
  authorize(ctx, 'weather.upload')
  let read: ReadYear | undefined
  const kept = await uploadFile(ctx, request, {
    limitBytes: weatherLimitBytes,
    action: 'weather.upload',
    check: async (localPath) => {
      read = accepted(readWeather((await readFile(localPath)).toString('utf8')), 'file')
    },
  })
  return recordWeather(ctx, kept.sha256, read!)
}

/**
 * Keeps a synthetic year of twelve monthly means. What is stored are the means: the hours follow
 * from them. @throws ServiceError `invalid` for months that the sun cannot give at the latitude.
 */
export async function createSyntheticWeather(
  ctx: Context,
  input: SyntheticYearInput,
): Promise<Weather> {
  authorize(ctx, 'weather.upload')
  const read = accepted(syntheticYear(input), 'months')
  const bytes = new TextEncoder().encode(JSON.stringify(syntheticYearInput.parse(input)))
  const name = `${input.site.stationId}.json`
  const kept = await keepFile(ctx, bytes, name, { action: 'weather.upload' })
  return recordWeather(ctx, kept.sha256, read)
}

async function recordWeather(ctx: Context, sha256: string, read: ReadYear): Promise<Weather> {
  const { meta } = read.year
  const id = await ctx.db.transaction(async (tx) => {
    const name = [meta.name, meta.region].filter(Boolean).join(', ')
    const [row] = await tx
      .insert(weather)
      .values({
        sha256,
        kind: meta.kind,
        name,
        meta,
        report: read.report,
        recordedAt: ctx.now,
        recordedBy: actorId(ctx),
      })
      .onConflictDoNothing({ target: weather.sha256 })
      .returning({ id: weather.id })
    if (row) {
      const after = { sha256, name, kind: meta.kind }
      await recordAudit(ctx, tx, {
        action: 'weather.upload',
        subjectKind: 'weather',
        subjectId: row.id,
        after,
      })
      return row.id
    }
    const [known] = await tx
      .select({ id: weather.id })
      .from(weather)
      .where(eq(weather.sha256, sha256))
    return known!.id
  })
  return getWeather(ctx, id)
}

/** Every weather year that is kept, the latest first. */
export async function listWeather(ctx: Context): Promise<Weather[]> {
  authorize(ctx, 'weather.read')
  const rows = await ctx.db.select().from(weather).orderBy(desc(weather.recordedAt))
  return rows.map(viewOf)
}

/** One weather year's heading and report. @throws ServiceError `not_found`. */
export async function getWeather(ctx: Context, id: string): Promise<Weather> {
  authorize(ctx, 'weather.read')
  if (!isUuid(id)) throw notFound('weather year')
  const [row] = await ctx.db.select().from(weather).where(eq(weather.id, id))
  if (!row) throw notFound('weather year')
  return viewOf(row)
}

/** The hours of a weather year as `packWeather` bytes. @throws ServiceError `not_found`. */
export async function downloadWeatherHours(ctx: Context, id: string): Promise<Response> {
  authorize(ctx, 'weather.read')
  const { year } = await getWeatherYear(ctx, id)
  return new Response(packWeather(year), {
    headers: {
      'content-type': 'application/octet-stream',
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, max-age=3600, immutable',
    },
  })
}

/**
 * The hours of a weather year, read from its bytes. Shared between callers: never write into them.
 * @throws ServiceError `not_found`, `unavailable` where the store does not hold the bytes.
 */
export async function getWeatherYear(
  ctx: Context,
  id: string,
): Promise<{ weather: Weather; year: WeatherYear }> {
  authorize(ctx, 'weather.read')
  const found = await getWeather(ctx, id)
  const held = recent.get(found.sha256)
  if (held) return { weather: found, year: held }
  const opened = await getFileStore().open(found.sha256)
  if (!opened)
    throw new ServiceError('unavailable', 'The weather file is recorded, but not in the store.')
  const { year } = accepted(readKept(found.kind, await new Response(opened.stream).text()), 'file')
  remember(found.sha256, year)
  return { weather: found, year }
}

function readKept(kind: Weather['kind'], text: string): WeatherResult {
  return kind === 'synthetic'
    ? syntheticYear(syntheticYearInput.parse(JSON.parse(text)))
    : readWeather(text)
}

/** The last few years that were read, by the SHA-256 of their bytes; half a megabyte each. */
const recent = new Map<string, WeatherYear>()
const mostRecent = 4

function remember(sha256: string, year: WeatherYear): void {
  recent.set(sha256, year)
  const [oldest] = recent.keys()
  if (recent.size > mostRecent && oldest) recent.delete(oldest)
}

/** A year that could be read. @throws ServiceError `invalid` with every issue of one that could not. */
export function accepted(result: WeatherResult, path: string): ReadYear {
  if (result.ok) return result
  const fields = result.errors.map((issue) => ({
    path: pathOf(issue, path),
    message: issue.message,
  }))
  const more: FieldError[] = result.truncated
    ? [{ path, message: `Only the first ${fields.length} faults are listed.` }]
    : []
  throw new ServiceError('invalid', fields[0]?.message ?? 'The weather file cannot be read.', [
    ...fields,
    ...more,
  ])
}

function pathOf(issue: WeatherIssue, path: string): string {
  return [path, issue.row && `row ${issue.row}`, issue.column].filter(Boolean).join('.')
}

function viewOf(row: typeof weather.$inferSelect): Weather {
  return {
    id: row.id,
    sha256: row.sha256,
    kind: row.kind,
    name: row.name,
    meta: row.meta as Weather['meta'],
    report: row.report as Weather['report'],
    recordedAt: row.recordedAt.toISOString(),
  }
}
