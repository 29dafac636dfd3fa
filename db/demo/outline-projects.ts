import { DemoDates, ours, theirs, type DemoProject } from '@/db/demo/story'

const queueDesk = 'Queue desk, Ambrel Valley Electric'
const quaidRowe = 'Anselm Quaid-Rowe, Cinder Basin'

/** The second gate runs; its four parts must close by one date. */
function juniperFlat(d: DemoDates): DemoProject {
  const gateDue = d.day(7)
  const received = d.daysBefore(gateDue, 30)
  const report = d.before(received, 35)
  return {
    name: 'Juniper Flat',
    town: 'Sorrel Wells',
    latitude: 39.45,
    longitude: -111.16,
    organization: 'ave',
    procedure: 'outline',
    requestNo: 'AVE-26C-014',
    terms: {
      requestedMw: 48,
      dcMw: 62.4,
      poi: 'Sorrel 69 kV bus',
      poiVoltageKv: 69,
      technology: 'Solar',
    },
    events: [
      ours('developer', d.before(report, 155), 'file', 'filed', { time: '15:00' }),
      theirs(report, 'study', 'given', {
        entry: {
          channel: 'letter',
          direction: 'in',
          parties: queueDesk,
          subject: 'AVE-26C-014: study report',
          text: '184 pages; three actions for us.',
        },
      }),
      ours('liaison', d.before(received, 25), 'meeting', 'held', { time: '10:00' }),
      {
        by: 'liaison',
        on: received,
        entry: {
          channel: 'email',
          direction: 'in',
          parties: queueDesk,
          subject: 'AVE-26C-014: facilities study agreement',
          text: 'Agreement, data, full site control and the deposit are due 30 calendar days from receipt.',
        },
        fact: {
          kind: 'stated',
          step: 'gate',
          instance: 1,
          dueOn: gateDue,
          note: '30 calendar days from receipt, as the e-mail says.',
        },
      },
      {
        by: 'liaison',
        on: d.day(-10),
        entry: {
          channel: 'meeting',
          direction: 'out',
          parties: 'Our team',
          subject: 'Inverter change',
          text: 'C-3150 gives way to C-4200: 50.4 MVA cannot hold a power factor of 0.95 at 69 kV.',
          visibility: 'internal',
        },
      },
      {
        by: 'liaison',
        on: d.day(-10),
        time: '15:30',
        entry: {
          channel: 'email',
          direction: 'out',
          parties: queueDesk,
          subject: 'AVE-26C-014: must the inverter change be approved?',
          text: 'Same export limit; data sheet attached to the portal.',
          replyOwedBy: 'them',
          replyOwedOn: d.day(3),
        },
      },
    ],
    expects: [],
  }
}

/** The restudy came late; leaving is possible until the gate. */
function mesaLarga(d: DemoDates): DemoProject {
  const report = d.before(d.day(0), 6)
  return {
    name: 'Mesa Larga',
    town: 'Vantry',
    latitude: 38.21,
    longitude: -99.4,
    organization: 'cbto',
    procedure: 'outline',
    requestNo: 'CB-A-0912',
    terms: {
      requestedMw: 200,
      dcMw: 276,
      poi: 'Vantry 345 kV',
      poiVoltageKv: 345,
      technology: 'Solar',
    },
    events: [
      ours('developer', d.before(report, 280), 'file', 'filed', { time: '14:00' }),
      theirs(report, 'study', 'given', {
        entry: {
          channel: 'letter',
          direction: 'in',
          parties: quaidRowe,
          subject: 'CB-A-0912: restudy report, group North',
          text: '212 pages. Upgrades assigned to us rise by 31 %.',
        },
      }),
      {
        by: 'liaison',
        on: d.day(-2),
        fact: { kind: 'scheduled', step: 'meeting', instance: 1, dueOn: d.day(5) },
      },
      {
        by: 'liaison',
        on: d.day(-2),
        fact: {
          kind: 'stated',
          step: 'meeting',
          instance: 1,
          dueOn: d.day(5),
          note: 'Invitation to the report meeting.',
        },
      },
    ],
    expects: [],
  }
}

/** Large requests, followed by stated dates until the operators' cluster procedures are kept. */
export function outlineProjects(d: { ave: DemoDates; cbto: DemoDates }): DemoProject[] {
  return [juniperFlat(d.ave), mesaLarga(d.cbto)]
}
