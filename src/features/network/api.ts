import { queryOptions } from '@tanstack/react-query';
import { LaboratoryListResponse, LaboratoryResponse } from '#shared/contracts/network.ts';
import { get } from '#src/lib/api-client.ts';

/** Every laboratory, as it stands today. */
export const laboratoryListQuery = queryOptions({
  queryKey: ['network', 'list'],
  queryFn: ({ signal }) => get('/api/laboratories', LaboratoryListResponse, { signal }),
});

/** One laboratory with its recognitions, its scope and, where one may see them, its people. */
export function laboratoryQuery(laboratoryId: string) {
  return queryOptions({
    queryKey: ['network', 'one', laboratoryId],
    queryFn: ({ signal }) => get(`/api/laboratories/${laboratoryId}`, LaboratoryResponse, { signal }),
  });
}
