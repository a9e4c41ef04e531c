/** Keeps the place while something comes. */
export const Loading = ({ label }: { label: string }) => (
  <p role="status" className="grid min-h-24 place-items-center rounded-2xl bg-(--raised) p-6 text-(--quiet)">
    {label} …
  </p>
);
