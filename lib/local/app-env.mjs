import { appSecrets, demoPassword } from './secrets.mjs'
import { filesFolder } from './services.mjs'

/**
 * Environment of the web server and the workers. They sign in as the application role only: the
 * owner's address stays with the start command.
 */
export function appEnv({ database, mail, address }) {
  return {
    ...appSecrets(),
    DATABASE_URL: database.appUrl,
    DATABASE_OWNER_URL: '',
    DEMO_PASSWORD: demoPassword().value,
    FILES_DIR: process.env.FILES_DIR || filesFolder(database.ours?.name ?? 'database'),
    MAIL_PAGE_URL: mail.page ?? '',
    NEXTAUTH_URL: process.env.NEXTAUTH_URL || address,
    NEXT_TELEMETRY_DISABLED: '1',
    SMTP_URL: mail.url,
  }
}
