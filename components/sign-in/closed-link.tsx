import { LinkButton } from '@/components/ui/link-button'
import { routes } from '@/lib/routes'

const words = {
  used: {
    title: 'This link was used already',
    text: 'A link works once. If it was you, sign in with the password you chose.',
  },
  expired: {
    title: 'This link has expired',
    text: 'It was open for a limited time, or a newer link took its place.',
  },
  unknown: {
    title: 'This link is not known here',
    text: 'Check that it was copied whole from the e-mail.',
  },
}

interface ClosedLinkProps {
  state: keyof typeof words
  /** How to get a new one. */
  next: string
}

/** What a one-time link says that opens nothing any more. */
export function ClosedLink({ state, next }: ClosedLinkProps) {
  const { title, text } = words[state]
  return (
    <section role="alert" className="border-late border-l-4 py-1 pl-4">
      <h2 className="text-late">{title}</h2>
      <p className="mt-1">{text}</p>
      <p className="mt-1">{next}</p>
      <div className="mt-4 flex flex-wrap gap-2.5">
        <LinkButton href={routes.signIn()} look="primary">
          Sign in
        </LinkButton>
        <LinkButton href={routes.forgotPassword()}>Ask for a new link</LinkButton>
      </div>
    </section>
  )
}
