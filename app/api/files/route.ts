import { route } from '@/lib/http/route'
import { uploadFile } from '@/lib/services/files'

/** Receives one file as the raw body; headers `x-file-name` and, if known, `x-content-sha256`. */
export const POST = route({
  action: 'file.upload',
  status: 201,
  run: (ctx, _input, _params, request) => uploadFile(ctx, request),
})
