import { getHealth } from '@/lib/services/health'

export const dynamic = 'force-dynamic'

export async function GET(): Promise<Response> {
  const health = await getHealth()
  return Response.json(health, {
    status: health.database === 'down' ? 503 : 200,
    headers: { 'cache-control': 'no-store' },
  })
}
