import type { Metadata } from 'next'
import { ApiTokens } from '@/app/(inside)/me/_components/api-tokens'
import { OwnDetails } from '@/app/(inside)/me/_components/own-details'
import { OwnPassword } from '@/app/(inside)/me/_components/own-password'
import { TitleBlock } from '@/components/ui/title-block'
import { pageContext } from '@/lib/auth/page-person'
import { listTokens } from '@/lib/services/api-tokens'
import { getMe } from '@/lib/services/own-account'

export const metadata: Metadata = { title: 'Your account' }

export default async function MePage() {
  const ctx = await pageContext()
  const [me, tokens] = await Promise.all([getMe(ctx), listTokens(ctx)])
  return (
    <>
      <TitleBlock
        label="Your account"
        cells={[
          { caption: 'Your account', value: me.name, heading: true, grow: 2 },
          { caption: 'E-mail', value: me.email, grow: 2 },
          { caption: me.roles.length > 1 ? 'Roles' : 'Role', value: me.roles.join(', ') },
        ]}
      />
      <div className="mt-8 grid items-start gap-x-12 gap-y-10 lg:grid-cols-2">
        <OwnDetails me={me} />
        <OwnPassword email={me.email} />
        <ApiTokens tokens={tokens.items} zone={me.zone} />
      </div>
    </>
  )
}
