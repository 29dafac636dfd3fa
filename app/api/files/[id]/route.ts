import { route } from '@/lib/http/route'
import { downloadFile } from '@/lib/services/files'

/** A file by the place it is linked to, as a download. */
export const GET = route<undefined, { id: string }>({
  action: 'file.read',
  run: (ctx, _input, { id }) => downloadFile(ctx, id),
})
