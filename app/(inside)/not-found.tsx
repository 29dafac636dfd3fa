import type { Metadata } from 'next'
import { NotFoundText } from '@/app/not-found-text'

export const metadata: Metadata = { title: 'No such page' }

export default function InsideNotFound() {
  return <NotFoundText />
}
