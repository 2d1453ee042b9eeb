import { permission } from '#server/policy/permission.ts';
import { readsInFull, worksIn } from '#server/policy/user.ts';
import type { DocumentRow } from './document.model.ts';

/** Adding a file to a laboratory's documents. */
export const addDocumentPermission = permission<{ laboratoryId: string }>(
  'document:add',
  (user, { laboratoryId }) =>
    user.isRegistrar || worksIn(user, laboratoryId, 'metrologist', 'signatory', 'laboratory administrator'),
);

export interface DocumentSubject {
  document: DocumentRow;
  /** The laboratories whose document it is. */
  laboratoryIds: readonly string[];
}

/** Opening a document: for those who read in full one of the laboratories whose document it is. */
export const readDocument = permission<DocumentSubject>('document:read', (user, { laboratoryIds }) =>
  laboratoryIds.some((laboratoryId) => readsInFull(user, laboratoryId)),
);
