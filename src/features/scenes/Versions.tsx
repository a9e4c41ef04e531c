import { useQuery } from '@tanstack/react-query';
import type { SceneVersion } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Loading } from '@/components/Loading';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { momentWords } from '@/lib/words';

interface Props {
  sceneId: string;
  current: number;
  /** Null for those who only look. */
  onTake: ((version: number) => void) | null;
}

/** Every saved version; taking one puts it in the editor, and saving makes it the newest. */
export const Versions = ({ sceneId, current, onTake }: Props) => {
  const list = useQuery({
    queryKey: queryKeys.sceneVersions(sceneId),
    queryFn: () => api.get<SceneVersion[]>(`/api/scenes/${sceneId}/versions`),
  });
  if (list.isPending) return <Loading label="Versions" />;
  if (list.error) return <Problem problem={list.error} onRetry={() => void list.refetch()} />;
  return (
    <ul className="divide-y divide-(--line)">
      {[...list.data]
        .sort((a, b) => b.version - a.version)
        .map(({ version, at, by }) => (
          <li key={version} className="flex items-center justify-between gap-3 py-1">
            <span className="min-w-0">
              <span className="font-mono">{version}</span>{' '}
              <span className="text-sm text-(--quiet)">
                {momentWords(at)}
                {by && ` · ${by}`}
              </span>
            </span>
            {version === current ? (
              <span className="text-sm text-(--quiet)">saved now</span>
            ) : (
              onTake && (
                <Button onClick={() => onTake(version)} aria-label={`Go back to version ${version}`}>
                  Go back
                </Button>
              )
            )}
          </li>
        ))}
    </ul>
  );
};
