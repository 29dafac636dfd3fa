import { DemoDates, ours, theirs, type DemoProject } from '@/db/demo/story'

const desk = 'Queue desk, Ambrel Valley Electric'

/** Failed the 15 % screen; supplemental review is offered. */
function sableOrchard(d: DemoDates): DemoProject {
  const acceptDue = d.day(5)
  const offer = d.before(acceptDue, 15)
  const reviewed = d.before(offer, 2)
  const complete = d.before(reviewed, 15)
  const filed = d.before(complete, 8)
  return {
    name: 'Sable Orchard',
    town: 'Pellow Springs',
    latitude: 39.68,
    longitude: -110.92,
    organization: 'ave',
    procedure: 'federal_fast_track',
    requestNo: 'AVE-D-0295',
    terms: {
      requestedMw: 5,
      dcMw: 6.4,
      poi: '34.5 kV mainline, 2.1 miles',
      poiVoltageKv: 34.5,
      technology: 'Solar',
      onMainline: true,
    },
    events: [
      ours('developer', filed, 'file', 'filed', { time: '13:15' }),
      theirs(complete, 'completeness', 'complete'),
      theirs(reviewed, 'initial_review', 'fail', {
        entry: {
          channel: 'email',
          direction: 'in',
          parties: desk,
          subject: 'AVE-D-0295: result of the initial review',
          text: 'Screen 2.2.1.2 fails: (1.1 + 5.0) MW over 21.0 MW line-section peak is 29 %, more than 15 %.',
        },
      }),
      theirs(offer, 'options', 'supplemental', {
        entry: {
          channel: 'email',
          direction: 'in',
          parties: desk,
          subject: 'AVE-D-0295: offer of supplemental review',
          text: 'Estimated cost $12,500. Answer within 15 business days, else the study process.',
        },
      }),
    ],
    expects: [{ step: 'accept_supplemental', dueOn: acceptDue }],
  }
}

function harrowLane(d: DemoDates): DemoProject {
  const filed = d.before(d.day(2), 3)
  return {
    name: 'Harrow Lane',
    town: 'Sorrel Wells',
    latitude: 39.44,
    longitude: -111.22,
    organization: 'ave',
    procedure: 'federal_fast_track',
    requestNo: 'AVE-D-0317',
    terms: {
      requestedMw: 1.5,
      dcMw: 1.95,
      poi: '12.47 kV feeder SW-2',
      poiVoltageKv: 12.47,
      technology: 'Solar',
    },
    events: [
      ours('developer', filed, 'file', 'filed', {
        time: '16:10',
        entry: {
          channel: 'portal',
          direction: 'out',
          parties: 'Ambrel Valley portal',
          subject: 'Fast track request filed',
          text: 'Filed with form, land evidence and fee.',
        },
      }),
    ],
    expects: [{ step: 'acknowledge', dueOn: d.day(2) }],
  }
}

function quillmarkMeadow(): DemoProject {
  return {
    name: 'Quillmark Meadow',
    town: 'Pellow Springs',
    latitude: 39.7,
    longitude: -110.9,
    organization: 'ave',
    procedure: 'federal_fast_track',
    terms: {
      requestedMw: 3.6,
      dcMw: 4.6,
      poi: '34.5 kV feeder PS-1',
      poiVoltageKv: 34.5,
      technology: 'Solar',
    },
    events: [],
    expects: [],
  }
}

function marshKettle(d: DemoDates): DemoProject {
  const signDue = d.day(12)
  const sent = d.before(signDue, 30)
  const reviewed = d.before(sent, 4)
  const complete = d.before(reviewed, 13)
  const filed = d.before(complete, 9)
  return {
    name: 'Marsh Kettle',
    town: 'Brannock Mills',
    latitude: 39.03,
    longitude: -111.6,
    organization: 'ave',
    procedure: 'federal_fast_track',
    requestNo: 'AVE-D-0288',
    terms: {
      requestedMw: 2,
      dcMw: 2.5,
      poi: '12.47 kV feeder BM-1',
      poiVoltageKv: 12.47,
      technology: 'Solar',
    },
    events: [
      ours('developer', filed, 'file', 'filed', { time: '10:00' }),
      theirs(complete, 'completeness', 'complete'),
      theirs(reviewed, 'initial_review', 'pass'),
      theirs(sent, 'agreement_screens', 'sent', {
        entry: {
          channel: 'email',
          direction: 'in',
          parties: desk,
          subject: 'AVE-D-0288: agreement for signature',
          text: 'Executable agreement; return it signed within 30 business days.',
        },
      }),
    ],
    expects: [{ step: 'sign', dueOn: signDue }],
  }
}

/** The fast-track projects at Ambrel Valley Electric. */
export function ambrelFastTrackProjects(dates: DemoDates): DemoProject[] {
  return [sableOrchard(dates), harrowLane(dates), quillmarkMeadow(), marshKettle(dates)]
}
