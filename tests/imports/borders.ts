import type { IRegularForbiddenRuleType } from 'dependency-cruiser';

const forbid = (
  name: string,
  comment: string,
  from: IRegularForbiddenRuleType['from'],
  to: IRegularForbiddenRuleType['to'],
): IRegularForbiddenRuleType => ({ name, comment, severity: 'error', from, to });

/** A package as dependency-cruiser sees it: where it lies once resolved. */
const pack = (names: string) => `node_modules/(@types/)?(${names})/`;

/** Who may import whom, each with the reason that a reader of the failure needs. */
export const borders: IRegularForbiddenRuleType[] = [
  forbid(
    'no-cycles',
    'Two modules that need each other are one: split out what both use.',
    {},
    { circular: true },
  ),
  forbid('all-resolve', 'An import that leads nowhere breaks the start.', {}, { couldNotResolve: true }),
  forbid(
    'shared-is-pure',
    'Hub, pages, replay and tests all run shared/: it knows neither Node, nor the DOM, nor any package but zod.',
    { path: '^shared/' },
    { pathNot: ['^shared/', pack('zod')] },
  ),
  forbid(
    'shared-from-top-to-bottom',
    'Time, mapping, venue, safety and brand are below the show: they never ask what a show is.',
    { path: '^shared/(time|mapping|venue|safety|brand)/' },
    { path: '^shared/(show|protocol|api)/' },
  ),
  forbid(
    'stage-link-inputs-apart',
    'Renderer, socket and inputs are used by pages and know only shared/, so that each can be tested and replaced alone.',
    { path: '^src/(stage|link|inputs)/' },
    { path: '^(src|server)/', pathNot: '^src/$1/' },
  ),
  forbid(
    'no-react-below-pages',
    'Renderer, socket and inputs run on the display page, which has no React.',
    { path: '^src/(stage|link|inputs|pages/display)/' },
    { path: pack('react|react-dom|react-router-dom|@tanstack') },
  ),
  forbid(
    'features-apart',
    'Features do not import each other: a page composes them.',
    { path: '^src/features/([^/]+)/' },
    { path: '^src/(features|pages)/', pathNot: '^src/features/$1/' },
  ),
  forbid(
    'components-have-no-subject',
    'A plain part knows no show, scene or socket.',
    { path: '^src/components/' },
    { path: '^src/(features|pages|stage|link|inputs)/' },
  ),
  forbid(
    'hooks-and-lib-below-features',
    'Hooks and lib are what features stand on.',
    { path: '^src/(hooks|lib)/' },
    { path: '^src/(features|pages|components)/' },
  ),
  forbid(
    'routes-hub-media-apart',
    'Routes, hub and media tell each other things through callbacks that server/index.ts wires.',
    { path: '^server/(routes|hub|media)/' },
    { path: '^server/(routes|hub|media|app|index)', pathNot: '^server/$1/' },
  ),
  forbid(
    'services-below-edges',
    'Services and models are the work behind routes, hub and media, and know none of them.',
    { path: '^server/(services|models|mail)/' },
    { path: '^server/(routes|hub|app|index)' },
  ),
  forbid(
    'server-never-src',
    'Server and pages meet in shared/ only.',
    { path: '^server/' },
    { path: '^src/' },
  ),
  forbid(
    'src-never-server',
    'Server and pages meet in shared/ only.',
    { path: '^src/' },
    { path: '^server/' },
  ),
  forbid(
    'pixi-on-the-stage',
    'Only the stage draws; a handset must never load the renderer.',
    { path: '^(src|shared|server)/', pathNot: '^src/stage/' },
    { path: pack('pixi\\.js|@pixi') },
  ),
  forbid(
    'ws-in-the-hub',
    'One place opens sockets, so one place authorises and limits them.',
    { path: '^(src|shared|server)/', pathNot: '^server/hub/' },
    { path: pack('ws|socket\\.io') },
  ),
  forbid(
    'express-in-routes',
    'Express is an edge: services and hub take plain values.',
    { path: '^(src|shared|server)/', pathNot: '^server/(routes/|app)' },
    { path: pack('express'), dependencyTypesNot: ['type-only'] },
  ),
  forbid(
    'sequelize-in-models',
    'The database is spoken to in models, migrations and services.',
    { path: '^(src|shared|server)/', pathNot: '^server/(models|migrations|services)/' },
    { path: pack('sequelize') },
  ),
  forbid(
    'programs-in-media-and-cli',
    'Other programs are run where their arguments can be looked over: media jobs and the commands.',
    { path: '^(src|shared|server)/', pathNot: '^server/(media|cli)/' },
    { path: '^(node:)?child_process$' },
  ),
  forbid(
    'product-without-tests',
    'What ships does not lean on what tests it.',
    { path: '^(src|shared|server)/' },
    {
      path: [
        '^(tests|e2e|bench)/',
        pack('vitest|playwright|@playwright|socket\\.io|supertest|fast-check|happy-dom'),
      ],
    },
  ),
];
