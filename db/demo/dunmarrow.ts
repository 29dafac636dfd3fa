import { DemoDates, ours, theirs, type DemoEvent, type DemoProject } from '@/db/demo/story'

const hob = 'Hob Lanyard, superintendent'

/** Near miss at the closing hour: the second cure went in 22 minutes after Dunmarrow closed. */
function coldSpringRoad(d: DemoDates): DemoProject {
  const cureDue = d.day(-1)
  const second = d.before(cureDue, 10)
  const firstCure = d.before(second, 13)
  const first = d.before(firstCure, 9)
  const filed = d.before(first, 9)
  return {
    name: 'Cold Spring Road',
    town: 'Dunmarrow',
    latitude: 42.36,
    longitude: -76.02,
    organization: 'dml',
    procedure: 'state_level_two',
    requestNo: 'L2-0447',
    terms: {
      requestedMw: 2.8,
      dcMw: 3.5,
      poi: '13.2 kV feeder 7',
      poiVoltageKv: 13.2,
      technology: 'Solar',
      onMainline: true,
    },
    events: [
      ours('developer', filed, 'file', 'filed', {
        time: '10:40',
        entry: {
          channel: 'portal',
          direction: 'out',
          parties: 'Dunmarrow portal',
          subject: 'Level 2 request filed',
          text: 'Request with form, one-line and fee of $1,500. The portal shows the receipt.',
        },
      }),
      theirs(first, 'completeness', 'deficient', {
        entry: {
          channel: 'email',
          direction: 'in',
          parties: hob,
          subject: 'Request L2-0447: not complete',
          text: 'One-line diagram is not sealed. Available fault current is not stated.',
        },
      }),
      ours('engineer', firstCure, 'cure', 'supplied', {
        time: '14:05',
        entry: {
          channel: 'email',
          direction: 'out',
          parties: hob,
          subject: 'L2-0447: what was missing',
          text: 'Sealed one-line, revision 2, and the fault current statement.',
        },
      }),
      theirs(second, 'completeness', 'deficient', {
        instance: 2,
        entry: {
          channel: 'email',
          direction: 'in',
          parties: hob,
          subject: 'L2-0447: second review',
          text: 'Transformer winding on the one-line does not match the data sheet. The relay list is missing.',
        },
      }),
      {
        by: 'engineer',
        on: cureDue,
        time: '16:52',
        entry: {
          channel: 'portal',
          direction: 'out',
          parties: 'Dunmarrow portal',
          subject: 'L2-0447: exhibit D revision 3',
          text: 'Uploaded at 16:52 with the relay list; the portal took it. The utility closes at 16:30.',
        },
      },
      {
        by: 'liaison',
        on: d.day(0),
        time: '09:12',
        entry: {
          channel: 'call',
          direction: 'out',
          parties: hob,
          subject: 'Late upload',
          text: 'He will look at it if we write to him. Rule: they may extend the cure once, by at most 10 business days.',
          visibility: 'internal',
        },
      },
    ],
    expects: [{ step: 'cure', instance: 2, dueOn: cureDue }],
  }
}

/** The way through the screens to a signed agreement with facilities to build. */
function toAgreement(d: DemoDates, signed: string): DemoEvent[] {
  const sent = d.before(signed, 18)
  const results = d.before(sent, 12)
  const accepted = d.before(results, 27)
  const offered = d.before(accepted, 9)
  const reviewed = d.before(offered, 3)
  const complete = d.before(reviewed, 14)
  const filed = d.before(complete, 9)
  return [
    ours('developer', filed, 'file', 'filed', { time: '11:20' }),
    theirs(complete, 'completeness', 'complete'),
    theirs(reviewed, 'initial_review', 'fail'),
    theirs(offered, 'options', 'supplemental'),
    ours('developer', accepted, 'accept_supplemental', 'accepted', { amountMinor: 100_000 }),
    theirs(results, 'supplemental_review', 'pass_minor'),
    theirs(sent, 'agreement_supplemental', 'sent'),
    ours('developer', signed, 'sign', 'signed', { time: '15:10' }),
  ]
}

/** Built; notice of the witness test is owed ten business days before it. */
function linnetHollow(d: DemoDates): DemoProject {
  const noticeDue = d.day(3)
  const test = d.after(noticeDue, 10)
  const operation = d.after(test, 17)
  const signed = d.day(-190)
  const workStart = d.after(signed, 40)
  return {
    name: 'Linnet Hollow',
    town: 'Dunmarrow',
    latitude: 42.34,
    longitude: -76.05,
    organization: 'dml',
    procedure: 'state_level_two',
    requestNo: 'L2-0391',
    terms: {
      requestedMw: 2,
      grantedMw: 2,
      dcMw: 2.35,
      poi: '13.2 kV feeder 4',
      poiVoltageKv: 13.2,
      technology: 'Solar',
    },
    events: [
      ...toAgreement(d, signed),
      {
        by: 'developer',
        on: d.after(signed, 2),
        fact: { kind: 'scheduled', step: 'work_start', dueOn: workStart },
      },
      ours('developer', d.before(workStart, 22), 'security', 'posted', { amountMinor: 11_840_000 }),
      theirs(workStart, 'work_start', 'started'),
      ours('engineer', d.day(-6), 'built', 'complete', {
        entry: {
          channel: 'email',
          direction: 'out',
          parties: hob,
          subject: 'Linnet Hollow is mechanically complete',
          text: 'Punch list attached. We propose a day for the witness test.',
        },
      }),
      {
        by: 'liaison',
        on: d.day(-4),
        time: '11:00',
        entry: {
          channel: 'call',
          direction: 'in',
          parties: hob,
          subject: 'Day of the witness test',
          text: 'Agreed on the day; notice in writing ten business days before.',
          visibility: 'internal',
        },
        fact: { kind: 'scheduled', step: 'witness_test', dueOn: test },
      },
      {
        by: 'developer',
        on: d.day(-4),
        time: '11:30',
        fact: { kind: 'scheduled', step: 'operation', dueOn: operation },
      },
    ],
    expects: [{ step: 'test_notice', dueOn: noticeDue }],
  }
}

/** In operation; the final account is the utility's to give. */
function pikeHillLanding(d: DemoDates): DemoProject {
  const accountDue = d.day(8)
  const operation = d.monthsBefore(accountDue, 3)
  const signed = d.before(operation, 220)
  const test = d.before(operation, 8)
  return {
    name: 'Pike Hill Landing',
    town: 'Dunmarrow',
    latitude: 42.39,
    longitude: -76.0,
    organization: 'dml',
    procedure: 'state_level_two',
    requestNo: 'L2-0302',
    terms: {
      requestedMw: 3,
      grantedMw: 3,
      installedMw: 3,
      dcMw: 3.75,
      poi: '13.2 kV feeder 7',
      poiVoltageKv: 13.2,
      technology: 'Solar',
    },
    events: [
      ...toAgreement(d, signed),
      {
        by: 'developer',
        on: d.after(signed, 2),
        fact: { kind: 'scheduled', step: 'work_start', dueOn: d.after(signed, 50) },
      },
      ours('developer', d.after(signed, 26), 'security', 'posted', { amountMinor: 6_000_000 }),
      theirs(d.after(signed, 50), 'work_start', 'started'),
      ours('engineer', d.before(test, 25), 'built', 'complete'),
      {
        by: 'developer',
        on: d.before(test, 15),
        fact: { kind: 'scheduled', step: 'witness_test', dueOn: test },
      },
      {
        by: 'developer',
        on: d.before(test, 15),
        fact: { kind: 'scheduled', step: 'operation', dueOn: operation },
      },
      ours('liaison', d.before(test, 12), 'test_notice', 'given'),
      ours('developer', d.before(operation, 14), 'insurance', 'shown'),
      ours('engineer', test, 'witness_test', 'passed'),
      theirs(d.before(operation, 2), 'authorization', 'authorized', {
        entry: {
          channel: 'letter',
          direction: 'in',
          parties: hob,
          subject: 'Permission to operate in parallel',
          text: 'Authorization after the witness test.',
        },
      }),
      ours('developer', operation, 'operation', 'operating'),
    ],
    expects: [{ step: 'final_accounting', dueOn: accountDue }],
  }
}

/** The screens are running; their answer is near. */
function tollardBend(d: DemoDates): DemoProject {
  const reviewDue = d.day(6)
  const complete = d.before(reviewDue, 15)
  const filed = d.before(complete, 8)
  return {
    name: 'Tollard Bend',
    town: 'Dunmarrow',
    latitude: 42.33,
    longitude: -76.09,
    organization: 'dml',
    procedure: 'state_level_two',
    requestNo: 'L2-0452',
    terms: {
      requestedMw: 1.5,
      dcMw: 1.9,
      poi: '13.2 kV feeder 2',
      poiVoltageKv: 13.2,
      technology: 'Solar',
    },
    events: [
      ours('developer', filed, 'file', 'filed', { time: '09:30' }),
      theirs(complete, 'completeness', 'complete', {
        entry: {
          channel: 'email',
          direction: 'in',
          parties: hob,
          subject: 'L2-0452 is complete',
          text: 'The screens run from today.',
        },
      }),
    ],
    expects: [{ step: 'initial_review', dueOn: reviewDue }],
  }
}

/** The projects at Dunmarrow Municipal Light. */
export function dunmarrowProjects(dates: DemoDates): DemoProject[] {
  return [coldSpringRoad(dates), linnetHollow(dates), pikeHillLanding(dates), tollardBend(dates)]
}
