import type { Door } from '@/lib/http/door'
import {
  emlDraftSchema,
  emlInput,
  entryChoicesFilter,
  entryChoicesSchema,
  entryFilter,
  entryInput,
  entryPageSchema,
  entrySchema,
  repliesFilter,
  repliesSchema,
} from '@/lib/schemas/entry'
import { uploadedFileSchema } from '@/lib/schemas/file'

export const correspondenceDoors: Door[] = [
  {
    method: 'get',
    path: '/api/entries',
    summary: 'Correspondence, newest first, latest revision of each entry',
    action: 'entry.read',
    input: entryFilter,
    output: entryPageSchema,
  },
  {
    method: 'post',
    path: '/api/entries',
    summary: 'Record an entry, and the events it proves; the same id again is the same entry',
    action: 'entry.record',
    input: entryInput,
    output: entrySchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/entries/{id}',
    summary: 'One revision of an entry',
    action: 'entry.read',
    output: entrySchema,
  },
  {
    method: 'get',
    path: '/api/entries/replies-owed',
    summary: 'Entries whose reply is still owed, the soonest first',
    action: 'entry.read',
    input: repliesFilter,
    output: repliesSchema,
  },
  {
    method: 'get',
    path: '/api/entries/choices',
    summary: 'Organizations, further requests and open steps an entry about a request may name',
    action: 'entry.read',
    input: entryChoicesFilter,
    output: entryChoicesSchema,
  },
  {
    method: 'post',
    path: '/api/entries/from-eml',
    summary: 'Read an uploaded e-mail file into the fields of an entry; records nothing',
    action: 'entry.record',
    input: emlInput,
    output: emlDraftSchema,
  },
  {
    method: 'post',
    path: '/api/files',
    summary:
      'Upload one file as the raw body; headers x-file-name (URI-encoded) and x-content-sha256',
    action: 'file.upload',
    inputType: 'application/octet-stream',
    output: uploadedFileSchema,
    status: 201,
  },
  {
    method: 'get',
    path: '/api/files/{id}',
    summary: 'Download a file by the place it is linked to',
    action: 'file.read',
    outputType: 'application/octet-stream',
  },
]
