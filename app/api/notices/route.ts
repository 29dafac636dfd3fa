import { route } from '@/lib/http/route'
import { noticeFilter } from '@/lib/schemas/notice'
import { listNotices } from '@/lib/services/notice-list'

export const GET = route({ input: noticeFilter, run: (ctx, filter) => listNotices(ctx, filter) })
