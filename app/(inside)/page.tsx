import { redirect } from 'next/navigation'
import { routes } from '@/lib/routes'

/** The house opens on what is due. */
export default function Home() {
  redirect(routes.due())
}
