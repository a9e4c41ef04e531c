import { Button } from '@/components/Button';

interface Props {
  /** What the server said: who saved and when. */
  detail: string;
  busy: boolean;
  onTheirs: () => void;
  onCopy: () => void;
}

/** Somebody saved in between. Nothing is lost: one's own can become a scene of its own. */
export const Conflict = ({ detail, busy, onTheirs, onCopy }: Props) => (
  <div role="alert" className="flex flex-wrap items-center gap-3 rounded-xl border border-(--amber) p-4">
    <p className="min-w-52 flex-1">
      <strong className="text-(--amber)">▲ {detail}</strong>
      <span className="block">What you made is still here. Undo brings it back after loading theirs.</span>
    </p>
    <Button onClick={onTheirs} disabled={busy}>
      Load theirs
    </Button>
    <Button onClick={onCopy} disabled={busy}>
      Save mine as a copy
    </Button>
  </div>
);
