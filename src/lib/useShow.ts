import { useQuery } from '@tanstack/react-query';
import type { ShowDetail } from '#shared/api/shows';
import { api } from './api';
import { queryKeys } from './queryKeys';

/** One show with its phases and venue. */
export const useShow = (id: string) =>
  useQuery({ queryKey: queryKeys.show(id), queryFn: () => api.get<ShowDetail>(`/api/shows/${id}`) });
