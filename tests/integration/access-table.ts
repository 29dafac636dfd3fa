import type { Action } from '@/lib/domain/access'

/**
 * What the walk of access-walk.test.ts expects. A handler, page or service function that is not
 * here fails it: add the line with the action that lib/domain/access.ts knows.
 */

/** Opens without a session, and why. */
export interface Open {
  open: string
  /** False where the walk cannot call it: a library that needs a running server. */
  call?: false
}

export interface Guarded {
  action: Action
  /** Sent where the handler reads its input before it asks who may; `{}` unless told. */
  body?: unknown
  /** Query of a GET, such as `?by=us`. */
  query?: string
}

/** By method and address as its folder says it. Parameters are filled with a UUID nobody has. */
export const handlers: Record<string, Action | Guarded | Open> = {
  'GET /api/auth/[...nextauth]': { open: 'sign-in itself', call: false },
  'POST /api/auth/[...nextauth]': { open: 'sign-in itself', call: false },
  'GET /api/health': { open: 'asked by whoever watches the deployment; tells no names' },
  'GET /api/openapi.json': { open: 'the description holds no data' },
  'POST /api/one-time-links/request': { open: 'who forgot the password has no session' },
  'POST /api/one-time-links/accept': { open: 'the secret of the link is the authorization' },
  'POST /api/acknowledgements/by-link': { open: 'the secret of the e-mail is the authorization' },

  'GET /api/people': 'person.read',
  'POST /api/people': 'person.write',
  'GET /api/people/[id]': 'person.read',
  'PATCH /api/people/[id]': 'person.write',
  'POST /api/people/[id]/invitation': 'person.write',
  'GET /api/me': 'self.read',
  'PATCH /api/me': 'self.write',
  'POST /api/me/password': 'self.write',
  'GET /api/me/tokens': 'self.read',
  'POST /api/me/tokens': 'self.write',
  'DELETE /api/me/tokens/[id]': 'self.write',

  'GET /api/applications': 'application.read',
  'POST /api/applications': 'application.create',
  'GET /api/applications/choices': 'procedure.read',
  'GET /api/applications/[id]': 'application.read',
  'POST /api/applications/[id]/facts': 'fact.record',
  'GET /api/applications/[id]/milestones': 'application.read',
  'GET /api/obligations': 'obligation.read',
  'POST /api/acknowledgements': 'obligation.acknowledge',
  'POST /api/assignments': 'obligation.assign',
  'POST /api/clocks/count': 'clock.count',
  'GET /api/notices': 'notice.read',
  'GET /api/calendar': { action: 'calendar.read', query: '?from=2026-12-01&to=2026-12-31' },
  'GET /api/calendar/[feed]': { open: 'the secret of the address is the authorization' },
  'GET /api/me/calendar-address': 'calendar.feed',
  'POST /api/me/calendar-address': 'calendar.feed',
  'DELETE /api/me/calendar-address': 'calendar.feed',

  'GET /api/entries': 'entry.read',
  'POST /api/entries': 'entry.record',
  'GET /api/entries/[id]': 'entry.read',
  'GET /api/entries/replies-owed': 'entry.read',
  'GET /api/entries/choices': 'entry.read',
  'POST /api/entries/from-eml': 'entry.record',
  'POST /api/plant/estimate': 'plant.estimate',
  'POST /api/plant/strings': 'plant.estimate',
  'GET /api/weather': 'weather.read',
  'POST /api/weather': 'weather.upload',
  'POST /api/weather/synthetic': 'weather.upload',
  'GET /api/weather/[id]': 'weather.read',
  'GET /api/weather/[id]/hours': 'weather.read',
  'GET /api/projects/[id]/design': 'design.read',
  'POST /api/projects/[id]/design': 'design.write',
  'GET /api/applications/[id]/calculations': 'calculation.read',
  'POST /api/applications/[id]/calculations': 'calculation.freeze',
  'GET /api/applications/[id]/calculations/[no]': 'calculation.read',
  'GET /api/applications/[id]/exhibits': 'exhibit.read',
  'POST /api/applications/[id]/exhibits': 'exhibit.prepare',
  'GET /api/exhibits/[id]': 'exhibit.read',
  'GET /api/exhibits/[id]/document': 'exhibit.read',
  'POST /api/exhibits/[id]/check': 'exhibit.check',
  'POST /api/exhibits/[id]/issue': 'exhibit.issue',
  'POST /api/exhibits/[id]/make': 'exhibit.prepare',
  'POST /api/files': 'file.upload',
  'GET /api/files/[id]': 'file.read',
}

/** Pages outside the signed-in part, and why. All others stand in app/(inside). */
export const openPages: Record<string, string> = {
  '/sign-in': 'sign-in itself',
  '/reset': 'who forgot the password has no session',
  '/reset/[token]': 'the secret of the link is the authorization',
  '/welcome/[token]': 'the secret of the link is the authorization',
  '/acknowledge/[secret]': 'the secret of the e-mail is the authorization',
}

export interface ServiceRule {
  action: Action
  /** What follows the context, where the function looks at it before it asks who may. */
  args: unknown[]
}

/** Functions of lib/services by file and name, with the action each asks for first. */
export const services: Record<string, Action | ServiceRule> = {
  'acknowledgements.acknowledge': 'obligation.acknowledge',
  'api-tokens.createToken': 'self.write',
  'api-tokens.listTokens': 'self.read',
  'api-tokens.revokeToken': 'self.write',
  'applications.createApplication': 'application.create',
  'applications.getApplication': 'application.read',
  'applications.listApplicationChoices': 'procedure.read',
  'applications.listApplicationNames': 'application.read',
  'applications.listRecordableSteps': 'application.read',
  'assignments.assignObligation': 'obligation.assign',
  'calendar-events.allEvents': 'calendar.read',
  'calendar-events.listCalendarEvents': 'calendar.read',
  'calendar-feed.endCalendarAddress': 'calendar.feed',
  'calendar-feed.getCalendarAddress': 'calendar.feed',
  'calendar-feed.makeCalendarAddress': 'calendar.feed',
  'calendar-feed.readCalendarFeed': 'calendar.feed',
  'calculations.freezeCalculation': 'calculation.freeze',
  'calculations.getCalculation': 'calculation.read',
  'calculations.listCalculations': 'calculation.read',
  'counting.countClock': 'clock.count',
  'counting.listCalendarChoices': 'calendar.read',
  'designs.getDesignRevision': 'design.read',
  'designs.listDesignRevisions': 'design.read',
  'designs.reviseDesign': 'design.write',
  'due.listDue': 'obligation.read',
  'eml.readEml': 'entry.record',
  'entries.getEntry': 'entry.read',
  'entries.listEntries': 'entry.read',
  'entries.listRepliesOwed': 'entry.read',
  'entries.recordEntry': 'entry.record',
  'entry-choices.getEntryChoices': 'entry.read',
  'exhibit-renders.failRender': 'job.run',
  'exhibit-renders.findRenderInput': 'job.run',
  'exhibit-renders.makeDocumentAgain': 'exhibit.prepare',
  'exhibit-renders.requeueRenders': 'job.run',
  'exhibit-renders.settleRender': 'job.run',
  'exhibits.checkExhibit': 'exhibit.check',
  'exhibits.downloadExhibit': 'exhibit.read',
  'exhibits.getExhibitRevision': 'exhibit.read',
  'exhibits.issueExhibit': 'exhibit.issue',
  'exhibits.listExhibits': 'exhibit.read',
  'exhibits.prepareExhibit': 'exhibit.prepare',
  'facts.recomputeApplication': 'job.run',
  'facts.recordFact': { action: 'fact.record', args: ['id', { kind: 'happened' }] },
  'facts.recordFactInside': { action: 'fact.record', args: [{}, 'id', { kind: 'happened' }] },
  'files.downloadFile': 'file.read',
  'files.findAttachable': 'file.read',
  'files.keepFile': 'file.upload',
  'files.linkFiles': 'file.upload',
  'files.linkRevisedFiles': 'file.upload',
  'files.listFileLinks': 'file.read',
  'files.uploadFile': 'file.upload',
  'milestones.listMilestones': 'application.read',
  'notice-digest.sweepDigests': 'notice.send',
  'notice-list.listNotices': 'notice.read',
  'notice-send.sendNotices': 'notice.send',
  'notice-sweep.sweepNotices': 'notice.send',
  'one-time-links.sendInvitation': 'person.write',
  'own-account.changeMe': 'self.write',
  'own-account.changePassword': 'self.write',
  'own-account.getMe': 'self.read',
  'people.changePerson': 'person.write',
  'people.createPersonWithPassword': 'person.write',
  'people.getPerson': 'person.read',
  'people.invitePerson': 'person.write',
  'people.listPeople': 'person.read',
  'people.resendInvitation': 'person.write',
  'projection-check.compareProjections': 'job.run',
  'pipeline.listApplications': 'application.read',
  'plant.checkStrings': 'plant.estimate',
  'plant.estimatePlant': 'plant.estimate',
  'weather.createSyntheticWeather': 'weather.upload',
  'weather.downloadWeatherHours': 'weather.read',
  'weather.getWeather': 'weather.read',
  'weather.getWeatherYear': 'weather.read',
  'weather.listWeather': 'weather.read',
  'weather.uploadWeather': 'weather.upload',
}

const inside = 'a part of services that have asked already: takes their transaction or rows'
const before = 'comes before anybody is known'
const tool = 'a tool of services: reads and writes no subject by itself'

/** Functions that ask nobody, and why. */
export const unguarded: Record<string, string> = {
  'acknowledge-links.acknowledgeByLink': 'the secret of the e-mail is the authorization',
  'acknowledge-links.inspectAcknowledgeLink': 'the secret of the e-mail is the authorization',
  'acknowledge-links.refusalOf': tool,
  'acknowledgements.findObligation': inside,
  'acknowledgements.recordAcknowledgement': inside,
  'acknowledgements.runningDue': tool,
  'application-reading.readApplication': inside,
  'audit.recordAudit': tool,
  'calendar-events.closedDays': tool,
  'context.actorId': tool,
  'context.authorize': 'asks itself',
  'context.personOf': tool,
  'entry-checks.checkEntry': inside,
  'entry-reading.readEntries': inside,
  'entry-reading.rootOf': inside,
  'exhibit-data.calculationOf': inside,
  'exhibit-data.newExhibitData': inside,
  'exhibit-reading.groundOf': inside,
  'exhibit-reading.lockedRevision': inside,
  'exhibit-reading.outOfStepOf': inside,
  'exhibit-reading.revisionRowOf': inside,
  'exhibit-reading.revisionRows': inside,
  'exhibit-reading.revisionView': inside,
  'exhibits.askForDocument': inside,
  'fact-rows.factRowsOf': inside,
  'fact-rows.factsByApplication': inside,
  'health.getHealth': 'the open health door; tells no names',
  'item-views.holdersOf': inside,
  'item-views.obligationRowsOf': inside,
  'limiter.forgiveTry': before,
  'limiter.takeTry': before,
  'notice-sweep-reading.assignedTo': tool,
  'notice-sweep-reading.calendarOf': tool,
  'notice-sweep-reading.readSweep': inside,
  'notice-sweep-reading.silentUntil': tool,
  'notices.queueNotice': inside,
  'notices.queueNotices': inside,
  'notices.siteUrl': tool,
  'one-time-links.acceptLink': 'the secret of the link is the authorization',
  'one-time-links.inspectLink': 'the secret of the link is the authorization',
  'one-time-links.requestReset': before,
  'parties.organizationParties': inside,
  'parties.partiesOf': inside,
  'parties.partiesOfOne': inside,
  'passwords.hashPassword': tool,
  'passwords.passwordFits': before,
  'projection.computeSchedule': inside,
  'projection.rewriteProjection': inside,
  'sign-in.signIn': before,
}
