import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import type { Scene } from '#shared/scene/schema';
import { may } from '#shared/show/roles';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { SceneDesk } from '@/features/scenes/SceneDesk';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { showLinks } from '@/lib/showLinks';
import { useSession } from '@/lib/useSession';
import { useShow } from '@/lib/useShow';

/** One scene, to be made and seen as displays would draw it. */
export const ScenePage = () => {
  const { showId = '', sceneId = '' } = useParams();
  const session = useSession();
  const show = useShow(showId);
  const scene = useQuery({
    queryKey: queryKeys.scene(sceneId),
    queryFn: () => api.get<Scene>(`/api/scenes/${sceneId}`),
    // What is under the hand is not replaced behind one's back; a save finds out when somebody else was faster.
    refetchOnWindowFocus: false,
    staleTime: 0,
    gcTime: 0,
  });
  const assets = useQuery({ queryKey: queryKeys.assets, queryFn: () => api.get<Asset[]>('/api/assets') });
  const error = scene.error ?? show.error ?? assets.error;
  const again = () => {
    for (const query of [scene, show, assets]) void query.refetch();
  };
  return (
    <Page light="night" title={scene.data?.name ?? 'Scene'} where={show.data?.name} links={showLinks(showId)}>
      {error && <Problem problem={error} onRetry={again} />}
      {!error && (scene.isPending || show.isPending || assets.isPending) && <Loading label="The scene" />}
      {scene.data && show.data && assets.data && (
        <SceneDesk
          key={sceneId}
          scene={scene.data}
          show={show.data}
          assets={assets.data}
          mayEdit={session.user !== null && may(session.user.role, 'scene.edit')}
        />
      )}
    </Page>
  );
};
