import { paths } from './paths';

/** The pages of a show, in the order of the job. */
export const showLinks = (id: string) => [
  { to: paths.show(id), label: 'Plan' },
  { to: paths.library(), label: 'Library' },
  { to: paths.scenes(id), label: 'Scenes' },
  { to: paths.outputs(id), label: 'Outputs' },
  { to: paths.rehearsal(id), label: 'Rehearsal' },
  { to: paths.live(id), label: 'Live' },
  { to: paths.handset(id), label: 'Handset' },
  { to: paths.lookout(id), label: 'Lookout' },
];

/** The pages of a crew. */
export const crewLinks = [
  { to: paths.shows(), label: 'Shows' },
  { to: paths.library(), label: 'Library' },
  { to: paths.crew(), label: 'Crew' },
];
