import { addDays } from '@/lib/domain/clocks/civil-date'
import { DemoDates, ours, theirs, type DemoProject } from '@/db/demo/story'

const desk = 'Queue desk, Ambrel Valley Electric'
const ada = 'Ada Thornquell, Three Furrows'

/** Filed after the closing hour, so the utility's ten business days begin a day later. */
function oldMillFerry(d: DemoDates): DemoProject {
  const dayZero = d.before(d.day(2), 10)
  return {
    name: 'Old Mill Ferry',
    town: 'Brannock Mills',
    latitude: 39.02,
    longitude: -111.62,
    organization: 'ave',
    procedure: 'federal_study_process',
    requestNo: 'AVE-D-0310',
    terms: {
      requestedMw: 12.5,
      dcMw: 15.1,
      poi: '34.5 kV feeder BM-3',
      poiVoltageKv: 34.5,
      technology: 'Solar',
    },
    events: [
      ours('developer', d.before(dayZero, 1), 'file', 'filed', {
        time: '17:20',
        entry: {
          channel: 'portal',
          direction: 'out',
          parties: 'Ambrel Valley portal',
          subject: 'Study request filed',
          text: 'The portal stamped it 17:20, after the closing hour of 17:00.',
        },
      }),
      theirs(d.after(dayZero, 2), 'acknowledge', 'acknowledged'),
    ],
    expects: [{ step: 'completeness', dueOn: d.day(2) }],
  }
}

/** The utility is late with the impact study and has given no notice. */
function ferrisCut(d: DemoDates): DemoProject {
  const due = d.day(-11)
  const returned = d.before(due, 45)
  const tendered = d.before(returned, 21)
  const scoped = d.before(tendered, 4)
  const complete = d.before(scoped, 8)
  const filed = d.before(complete, 9)
  return {
    name: 'Ferris Cut',
    town: 'Sorrel Wells',
    latitude: 39.48,
    longitude: -111.21,
    organization: 'ave',
    procedure: 'federal_study_process',
    requestNo: 'AVE-T-0288',
    terms: {
      requestedMw: 20,
      dcMw: 25.8,
      poi: '46 kV line 12',
      poiVoltageKv: 46,
      technology: 'Solar',
    },
    events: [
      ours('developer', filed, 'file', 'filed', { time: '10:30' }),
      theirs(complete, 'completeness', 'complete'),
      ours('liaison', scoped, 'scoping', 'held', { time: '10:00' }),
      theirs(tendered, 'study_tender', 'transmission'),
      ours('developer', returned, 'transmission_agreement', 'returned', {
        time: '12:00',
        amountMinor: 3_000_000,
      }),
      {
        by: 'liaison',
        on: d.day(-9),
        entry: {
          channel: 'email',
          direction: 'out',
          parties: desk,
          subject: 'AVE-T-0288: impact study',
          text: 'The study was due two business days ago. Please give the reason and a new date.',
        },
      },
      {
        by: 'liaison',
        on: d.day(-4),
        entry: {
          channel: 'email',
          direction: 'out',
          parties: desk,
          subject: 'AVE-T-0288: impact study, second request',
          text: 'No notice and no new date has come.',
          replyOwedBy: 'them',
          replyOwedOn: d.day(3),
        },
      },
    ],
    expects: [{ step: 'transmission_study', dueOn: due }],
  }
}

/** Two dates: our count from the deemed receipt, and the later date of their letter. */
function bellweatherSouth(d: DemoDates): DemoProject {
  const deemedZero = d.before(d.day(2), 15)
  const posted = addDays(deemedZero, -3)
  const sent = d.open(posted)
  const stamped = d.after(deemedZero, 1)
  const studied = d.before(sent, 3)
  const returned = d.before(studied, 29)
  const tendered = d.before(returned, 20)
  const scoped = d.before(tendered, 4)
  const complete = d.before(scoped, 8)
  const filed = d.before(complete, 9)
  return {
    name: 'Bellweather South',
    town: 'Tessing',
    latitude: 41.08,
    longitude: -98.53,
    organization: 'tfec',
    procedure: 'tfec_study_process',
    requestNo: 'TF-2611',
    terms: {
      requestedMw: 9.9,
      dcMw: 12.6,
      poi: '24.9 kV, Halden Road feeder 2',
      poiVoltageKv: 24.9,
      technology: 'Solar',
    },
    events: [
      ours('developer', filed, 'file', 'filed', { time: '09:45', amountMinor: 1_990_000 }),
      theirs(complete, 'completeness', 'complete'),
      ours('liaison', scoped, 'scoping', 'held', { time: '13:00' }),
      theirs(tendered, 'study_tender', 'distribution'),
      ours('developer', returned, 'distribution_agreement', 'returned', { time: '11:00' }),
      theirs(studied, 'distribution_study', 'upgrades'),
      {
        by: 'liaison',
        on: stamped,
        fact: {
          kind: 'happened',
          step: 'facilities_tender',
          outcome: 'sent',
          instance: 1,
          sentOn: sent,
          receivedOn: stamped,
          channel: 'letter',
        },
        entry: {
          channel: 'letter',
          direction: 'in',
          parties: ada,
          subject: 'TF-2611: facilities study agreement',
          text: 'Agreement and a deposit of $25,000, returned no later than the date in the letter. The envelope shows the day of posting.',
        },
      },
      {
        by: 'liaison',
        on: stamped,
        time: '14:00',
        fact: {
          kind: 'stated',
          step: 'facilities_agreement',
          instance: 1,
          dueOn: d.after(d.day(2), 1),
          note: 'As their letter says.',
        },
      },
    ],
    expects: [{ step: 'facilities_agreement', dueOn: d.day(2) }],
  }
}

/** The requests that run on a study process. */
export function studyProjects(d: { ave: DemoDates; tfec: DemoDates }): DemoProject[] {
  return [oldMillFerry(d.ave), ferrisCut(d.ave), bellweatherSouth(d.tfec)]
}
