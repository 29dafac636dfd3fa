import type { Milestones } from '@/lib/schemas/milestone'
import { authorize, type Context } from '@/lib/services/context'
import { getApplication } from '@/lib/services/applications'

/** The dated steps of an application in the shape of the fixed door. */
export async function listMilestones(ctx: Context, applicationId: string): Promise<Milestones> {
  authorize(ctx, 'application.read')
  const { items } = await getApplication(ctx, applicationId)
  return {
    items: items
      .filter((item) => item.obligation === '' && item.status !== 'not_needed')
      .map((item) => ({
        step: item.step,
        instance: item.instance,
        title: item.title,
        party: item.party,
        state: item.standing.state,
        dueOn: item.dueOn,
        dueAt: item.dueAt,
        ...(item.statedDueOn && { statedDueOn: item.statedDueOn }),
        ...(item.startBy && { startBy: item.startBy }),
        forecastOn: item.status === 'open' && item.provisional ? item.dueOn : null,
        doneOn: item.doneOn,
        left: item.standing.left,
        derivation: item.derivation,
      })),
  }
}
