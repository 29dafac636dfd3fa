/** Invented organizations, as the demo scenario describes them. */
export interface DemoOrganization {
  key: 'ave' | 'cbto' | 'dml' | 'tfec' | 'wexbrook' | 'plainbank'
  name: string
  shortName: string
  kind: string
  zone: string
  closesAt: string | null
  receiptRule: 'as_is' | 'next_business_day'
  deemedReceivedDays: number | null
  calendar: 'federal' | 'ave' | 'cbto' | 'dml' | 'tfec'
  noticeAddress: string
  portal: string | null
  contacts: { name: string; desk: string; email: string }[]
}

export const demoOrganizations: DemoOrganization[] = [
  {
    key: 'ave',
    name: 'Ambrel Valley Electric Company',
    shortName: 'Ambrel Valley Electric',
    kind: 'Utility with its own wires',
    zone: 'America/Denver',
    closesAt: '17:00',
    receiptRule: 'next_business_day',
    deemedReceivedDays: null,
    calendar: 'ave',
    noticeAddress: 'interconnection@ambrel.example',
    portal: 'https://queue.ambrel.example',
    contacts: [
      { name: 'Queue desk', desk: 'Transmission', email: 'interconnection@ambrel.example' },
      { name: 'Corinne Ashgrave', desk: 'Studies', email: 'c.ashgrave@ambrel.example' },
      { name: 'Wes Tollimer', desk: 'Accounts', email: 'w.tollimer@ambrel.example' },
    ],
  },
  {
    key: 'cbto',
    name: 'Cinder Basin Transmission Operator',
    shortName: 'Cinder Basin Operator',
    kind: 'Regional operator',
    zone: 'America/New_York',
    closesAt: '17:00',
    receiptRule: 'as_is',
    deemedReceivedDays: null,
    calendar: 'cbto',
    noticeAddress: 'customers@cinderbasin.example',
    portal: 'https://requests.cinderbasin.example',
    contacts: [
      { name: 'Customer desk', desk: 'Customers', email: 'customers@cinderbasin.example' },
      { name: 'Anselm Quaid-Rowe', desk: 'Projects', email: 'a.quaidrowe@cinderbasin.example' },
    ],
  },
  {
    key: 'dml',
    name: 'Dunmarrow Municipal Light',
    shortName: 'Dunmarrow Municipal Light',
    kind: 'Town utility',
    zone: 'America/New_York',
    closesAt: '16:30',
    receiptRule: 'next_business_day',
    deemedReceivedDays: null,
    calendar: 'dml',
    noticeAddress: 'light@dunmarrow.example',
    portal: 'https://light.dunmarrow.example',
    contacts: [
      { name: 'Hob Lanyard', desk: 'Superintendent', email: 'h.lanyard@dunmarrow.example' },
    ],
  },
  {
    key: 'tfec',
    name: 'Three Furrows Electric Cooperative',
    shortName: 'Three Furrows Cooperative',
    kind: 'Distribution cooperative',
    zone: 'America/Chicago',
    closesAt: '16:00',
    receiptRule: 'as_is',
    deemedReceivedDays: 3,
    calendar: 'tfec',
    noticeAddress: 'PO Box 40, Tessing',
    portal: null,
    contacts: [
      { name: 'Ada Thornquell', desk: 'Engineering', email: 'engineering@threefurrows.example' },
    ],
  },
  {
    key: 'wexbrook',
    name: 'Wexbrook Transmission Company',
    shortName: 'Wexbrook Transmission',
    kind: 'Wires owner',
    zone: 'America/Chicago',
    closesAt: '17:00',
    receiptRule: 'as_is',
    deemedReceivedDays: null,
    calendar: 'federal',
    noticeAddress: 'projects@wexbrook.example',
    portal: null,
    contacts: [{ name: 'Joss Ferrand', desk: 'Projects', email: 'j.ferrand@wexbrook.example' }],
  },
  {
    key: 'plainbank',
    name: 'Plainbank Generation and Transmission',
    shortName: 'Plainbank G&T',
    kind: 'Affected system',
    zone: 'America/Chicago',
    closesAt: '17:00',
    receiptRule: 'as_is',
    deemedReceivedDays: null,
    calendar: 'federal',
    noticeAddress: 'studies@plainbank.example',
    portal: null,
    contacts: [{ name: 'Studies desk', desk: 'Studies', email: 'studies@plainbank.example' }],
  },
]

export const demoPeople = [
  { key: 'developer', name: 'Maren Oxley', roles: ['developer'], zone: 'America/Denver' },
  { key: 'engineer', name: 'Tobin Arceneth', roles: ['engineer'], zone: 'America/Chicago' },
  { key: 'engineer2', name: 'Ilse Vandermoor', roles: ['engineer'], zone: 'America/New_York' },
  { key: 'liaison', name: 'Dov Castellane', roles: ['liaison'], zone: 'America/New_York' },
  { key: 'executive', name: 'Priya Hallworth', roles: ['executive'], zone: 'America/Los_Angeles' },
  {
    key: 'administrator',
    name: 'Len Fairbrooke',
    roles: ['administrator'],
    zone: 'America/Denver',
  },
] as const
export type DemoPerson = (typeof demoPeople)[number]['key']
