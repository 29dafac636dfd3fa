import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query'
import { call } from '@/lib/client/fetcher'
import { upload } from '@/lib/client/upload'
import { api } from '@/lib/routes'
import {
  emlDraftSchema,
  entryChoicesSchema,
  entryPageSchema,
  entrySchema,
  type EmlInput,
  type EntryInputGiven,
  type EntryPage,
} from '@/lib/schemas/entry'
import { uploadedFileSchema, type UploadedFile } from '@/lib/schemas/file'

export const entryKeys = {
  all: ['entries'] as const,
  ofApplication: (applicationId: string) => ['entries', 'application', applicationId] as const,
  choices: (applicationId: string) => ['entries', 'choices', applicationId] as const,
}

/** An application's correspondence, page by page, from the page's first paint on. */
export function entriesQuery(applicationId: string, first: EntryPage) {
  return infiniteQueryOptions({
    queryKey: entryKeys.ofApplication(applicationId),
    queryFn: ({ pageParam, signal }) =>
      call(api.entries({ applicationId, after: pageParam }), entryPageSchema, { signal }),
    initialPageParam: undefined as string | undefined,
    getNextPageParam: (page: EntryPage) => page.next,
    initialData: { pages: [first], pageParams: [undefined] },
  })
}

/** What the form offers for another application. */
export function entryChoicesQuery(applicationId: string) {
  return queryOptions({
    queryKey: entryKeys.choices(applicationId),
    queryFn: ({ signal }) => call(api.entryChoices(applicationId), entryChoicesSchema, { signal }),
  })
}

export const recordEntry = (input: EntryInputGiven) =>
  call(api.entries(), entrySchema, { method: 'POST', body: input })

export const readEml = (input: EmlInput) =>
  call(api.entryFromEml(), emlDraftSchema, { method: 'POST', body: input })

export interface SendFileOptions {
  signal: AbortSignal
  onProgress: (sentBytes: number) => void
}

/** Sends one file with its SHA-256, so that the server can tell whether all of it arrived. */
export async function sendFile(
  file: File,
  { signal, onProgress }: SendFileOptions,
): Promise<UploadedFile> {
  const sha256 = await sha256Of(file)
  const headers: Record<string, string> = {
    'content-type': 'application/octet-stream',
    'x-file-name': encodeURIComponent(file.name),
  }
  if (sha256) headers['x-content-sha256'] = sha256
  return upload(api.files(), file, uploadedFileSchema, { headers, signal, onProgress })
}

/** Undefined on a page that came without https, where browsers do not offer hashing. */
async function sha256Of(file: File): Promise<string | undefined> {
  if (!globalThis.crypto?.subtle) return undefined
  const digest = await crypto.subtle.digest('SHA-256', await file.arrayBuffer())
  return Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, '0')).join('')
}
