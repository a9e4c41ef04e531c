/** Keys of everything that is fetched, so that what one page changes another sees. */
export const queryKeys = {
  session: ['session'] as const,
  sessions: ['sessions'] as const,
  crew: ['crew'] as const,
  mail: ['mail'] as const,
  demo: ['demo'] as const,
  shows: ['shows'] as const,
  show: (id: string) => ['shows', id] as const,
  scenes: (showId: string) => ['shows', showId, 'scenes'] as const,
  displays: (showId: string) => ['shows', showId, 'displays'] as const,
  asRun: (showId: string) => ['shows', showId, 'as-run'] as const,
  scene: (id: string) => ['scenes', id] as const,
  sceneVersions: (id: string) => ['scenes', id, 'versions'] as const,
  maps: (displayId: string) => ['displays', displayId, 'maps'] as const,
  venues: ['venues'] as const,
  brands: ['brands'] as const,
  assets: ['assets'] as const,
};
