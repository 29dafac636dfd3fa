import { z } from 'zod'
import { uuid } from '@/lib/schemas/common'

/** Largest attachment, in bytes. */
export const attachmentLimitBytes = 50_000_000

export const sha256Schema = z
  .string({ error: 'The SHA-256 is missing.' })
  .regex(/^[0-9a-f]{64}$/, 'A SHA-256 has 64 hexadecimal digits.')

/** A file received and kept, not yet belonging to anything. */
export const uploadedFileSchema = z.object({
  sha256: sha256Schema,
  size: z.number().int(),
  type: z.string(),
  name: z.string(),
})
export type UploadedFile = z.infer<typeof uploadedFileSchema>

/** A file in its place; `id` is that of the link, under which it is downloaded. */
export const fileLinkSchema = uploadedFileSchema.extend({ id: uuid })
export type FileLink = z.infer<typeof fileLinkSchema>
