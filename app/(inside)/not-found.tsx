import { NotFoundText } from '@/app/not-found-text'

export default function InsideNotFound() {
  return <NotFoundText />
}
