import { letter, type Letter } from '@/templates/notices/_parts'

interface Invitation {
  name: string
  email: string
  /** Address of the page where the password is chosen; it opens once. */
  link: string
}

/** The e-mail that invites a person to choose a password. */
export function invitationLetter({ name, email, link }: Invitation): Letter {
  return letter('Your invitation to Lineside', [
    { kind: 'paragraph', text: `${name}, you have been added to your company's Lineside.` },
    { kind: 'paragraph', text: 'Choose a password, then sign in with this address:' },
    { kind: 'block', cells: [{ caption: 'E-mail', value: email }] },
    { kind: 'link', label: 'Choose a password', href: link },
    {
      kind: 'note',
      text: 'The link works once and for 7 days. After that, ask an administrator for a new one.',
    },
    {
      kind: 'note',
      text: 'If you did not expect this, do nothing: without a password nobody can sign in.',
    },
  ])
}
