import type { Metadata } from 'next'
import { NotFoundText } from '@/app/not-found-text'

export const metadata: Metadata = { title: 'No such page' }

export default function NotFound() {
  return (
    <main className="px-4 py-8 md:px-8">
      <NotFoundText />
    </main>
  )
}
