/** Every address of the product, in one place. */
export const paths = {
  today: '/',
  signIn: '/sign-in',
  plans: '/plans',
  plan: (id: string) => `/plans/${id}`,
  signOff: (planId: string, missionId?: string) =>
    `/plans/${planId}/sign-off${missionId ? `?mission=${missionId}` : ''}`,
  passes: '/passes',
  elementSets: '/element-sets',
  elementSetUpload: '/element-sets/upload',
  satellites: '/satellites',
  satelliteNew: '/satellites/new',
  satellite: (id: string) => `/satellites/${id}`,
  missions: '/missions',
  mission: (id: string) => `/missions/${id}`,
  stations: '/stations',
  station: (id: string) => `/stations/${id}`,
  shift: '/shift',
  people: '/users',
  audit: '/audit',
  mails: '/mails',
} as const;
