import { useQuery } from '@tanstack/react-query';
import type { MapVersion } from '#shared/api/displays';
import { Button } from '@/components/Button';
import { Loading } from '@/components/Loading';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

interface Props {
  displayId: string;
  onGoBack: (version: MapVersion) => void;
}

const when = new Intl.DateTimeFormat(undefined, {
  day: 'numeric',
  month: 'short',
  hour: '2-digit',
  minute: '2-digit',
});

/** Saved versions of a display's map, newest first, each one tap away. */
export const VersionList = ({ displayId, onGoBack }: Props) => {
  const versions = useQuery({
    queryKey: queryKeys.maps(displayId),
    queryFn: () => api.get<MapVersion[]>(`/api/displays/${displayId}/maps`),
  });
  if (versions.isPending) return <Loading label="Versions" />;
  if (versions.error) return <Problem problem={versions.error} onRetry={() => void versions.refetch()} />;
  return (
    <ol className="flex flex-col gap-1">
      {versions.data.map((version, i) => (
        <li
          key={version.version}
          className="flex items-center justify-between gap-2 border-t border-(--line) py-2"
        >
          <span className="min-w-0 text-sm">
            <span className="font-mono">{version.version}</span> · {when.format(new Date(version.at))}
            {version.by && <> · {version.by}</>}
            {version.note && <span className="block truncate text-(--quiet)">{version.note}</span>}
          </span>
          {i > 0 && (
            <Button variant="quiet" onClick={() => onGoBack(version)}>
              Go back to {version.version}
            </Button>
          )}
        </li>
      ))}
    </ol>
  );
};
