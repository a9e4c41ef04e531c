import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { Asset } from '#shared/api/assets';
import { may } from '#shared/show/roles';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { AssetCard } from '@/features/library/AssetCard';
import { DropPlace } from '@/features/library/DropPlace';
import { UploadList } from '@/features/library/UploadList';
import { useUploads } from '@/features/library/useUploads';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { crewLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { count } from '@/lib/words';

/** While a file is being worked on, the list is read again this often, ms. */
const workingMs = 700;

const isWorking = ({ state }: Asset): boolean => state === 'waiting' || state === 'working';

/** The crew's clips, stills and marks. */
export const LibraryPage = () => {
  const client = useQueryClient();
  const session = useSession();
  const uploads = useUploads();
  const onSuccess = () => client.invalidateQueries({ queryKey: queryKeys.assets });
  const assets = useQuery({
    queryKey: queryKeys.assets,
    queryFn: () => api.get<Asset[]>('/api/assets'),
    refetchInterval: ({ state }) => (state.data?.some(isWorking) ? workingMs : false),
  });
  const edit = useMutation({
    mutationFn: ({ id, ...change }: { id: string; name?: string; kind?: Asset['kind'] }) =>
      api.patch<Asset>(`/api/assets/${id}`, change),
    onSuccess,
  });
  const remove = useMutation({ mutationFn: (id: string) => api.delete(`/api/assets/${id}`), onSuccess });
  const role = session.user?.role;
  const mayUpload = role !== undefined && may(role, 'asset.upload');
  const mayEdit = role !== undefined && may(role, 'asset.edit');
  const problemOf = (id: string): Error | null => {
    if (edit.error && edit.variables?.id === id) return edit.error;
    return remove.error && remove.variables === id ? remove.error : null;
  };
  const list = assets.data;
  return (
    <Page light="day" title="Library" links={crewLinks}>
      {mayUpload && <DropPlace onFiles={uploads.add} />}
      {uploads.list.length > 0 && (
        <UploadList
          uploads={uploads.list}
          onStop={uploads.stop}
          onAgain={uploads.again}
          onForget={uploads.forget}
        />
      )}
      {assets.isPending && <Loading label="Files" />}
      {assets.error && <Problem problem={assets.error} onRetry={() => void assets.refetch()} />}
      {list?.length === 0 && (
        <div className="mt-4">
          <Empty title="Nothing here yet">
            Clips from the client, photos of the bar, the mark as PNG or SVG: whatever they sent. Each file is
            turned into one that every display plays without a stutter.
          </Empty>
        </div>
      )}
      {list && list.length > 0 && (
        <>
          <p className="mt-4 mb-2 text-(--quiet)">
            {count(list.length, 'file')}
            {list.some(isWorking) && ` · ${count(list.filter(isWorking).length, 'file')} being converted`}
          </p>
          <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3 2xl:grid-cols-4">
            {list.map((asset) => (
              <AssetCard
                key={asset.id}
                asset={asset}
                mayEdit={mayEdit}
                problem={problemOf(asset.id)}
                onRename={(name) => edit.mutate({ id: asset.id, name })}
                onKind={(kind) => edit.mutate({ id: asset.id, kind })}
                onRemove={() => remove.mutate(asset.id)}
              />
            ))}
          </ul>
        </>
      )}
    </Page>
  );
};
