/** Every address of the program, as functions. */
export const paths = {
  setup: () => '/setup',
  signIn: () => '/sign-in',
  forgot: () => '/forgot',
  reset: () => '/reset',
  invite: () => '/invite',
  shows: () => '/shows',
  show: (id: string) => `/shows/${id}`,
  scenes: (id: string) => `/shows/${id}/scenes`,
  scene: (id: string, sceneId: string) => `/shows/${id}/scenes/${sceneId}`,
  outputs: (id: string) => `/shows/${id}/outputs`,
  lookout: (id: string) => `/shows/${id}/lookout`,
  rehearsal: (id: string) => `/shows/${id}/rehearsal`,
  live: (id: string) => `/shows/${id}/live`,
  handset: (id: string, room: 'live' | 'rehearsal' = 'live') =>
    `/shows/${id}/handset${room === 'rehearsal' ? '?room=rehearsal' : ''}`,
  library: () => '/library',
  crew: () => '/crew',
  mail: () => '/mail',
  display: () => '/display',
};
