import { letter, type Letter } from '@/templates/notices/_parts'

interface Reset {
  name: string
  email: string
  /** Address of the page where the new password is chosen; it opens once. */
  link: string
}

/** The e-mail that lets a person choose a new password. */
export function resetLetter({ name, email, link }: Reset): Letter {
  return letter('Choose a new password', [
    { kind: 'paragraph', text: `${name}, somebody asked for a new password for this address:` },
    { kind: 'block', cells: [{ caption: 'E-mail', value: email }] },
    { kind: 'link', label: 'Choose a new password', href: link },
    {
      kind: 'note',
      text: 'The link works once and for one hour. Your sessions end when it is used.',
    },
    { kind: 'note', text: 'If it was not you, do nothing: the old password stays.' },
  ])
}
