/** One demo sign-in per role, as printed at the end of a start. */
export const demoPeople = [
  ['developer', 'developer@demo.test'],
  ['engineer', 'engineer@demo.test'],
  ['checking engineer', 'engineer2@demo.test'],
  ['utility liaison', 'liaison@demo.test'],
  ['executive', 'executive@demo.test'],
  ['administrator', 'administrator@demo.test'],
]

/** Lines of the block that ends a start: address, people, password, mail. */
export function welcome({ address, password, mail, seeded }) {
  const people = demoPeople.map(([role, email]) => `  ${role.padEnd(18)} ${email}`)
  const signIn = seeded ? ['Sign in as', ...people, `Password: ${password}`] : []
  const read = mail.page ? `Mail is read at ${mail.page}` : 'Mail goes to SMTP_URL.'
  return ['', `Lineside is at ${address}`, ...signIn, read, 'Ctrl-C stops everything.', ''].join(
    '\n',
  )
}
