const cautions = [
  {
    title: 'Flashing light',
    text: 'Some guests get seizures from it. What comes with Lampyrid stays at or under three flashes a second; your own clips may not. Put a notice at the doors, and know how to reach Calm.',
  },
  {
    title: 'Bright projectors',
    text: 'Keep eyes out of the beam up to the hazard distance in the projector’s papers: stairs, balconies, the booth, people on ladders.',
  },
  {
    title: 'Overhead loads and power',
    text: 'Whatever hangs over people is rigged, with a second safety, by somebody licensed for it. The same goes for mains and distribution.',
  },
] as const;

/** The usual cautions. The house, local code and licensed people have the last word. */
export const SafetyBlock = () => (
  <div className="rounded-2xl border border-(--amber) p-4 md:p-5">
    <h2 className="mb-2 text-lg font-bold text-(--amber)">▲ Before guests come in</h2>
    <dl className="grid gap-4 md:grid-cols-3">
      {cautions.map(({ title, text }) => (
        <div key={title}>
          <dt className="font-bold">{title}</dt>
          <dd>{text}</dd>
        </div>
      ))}
    </dl>
    <p className="mt-3 text-(--quiet)">
      Lampyrid cannot judge a room. The venue, local code and licensed people decide, not this page.
    </p>
  </div>
);
