import { UniqueConstraintError } from 'sequelize';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { newId, type Context } from '#server/http/context.ts';
import { documentModel, type DocumentRow } from './document.model.ts';
import { documentByContent } from './document.queries.ts';
import { keepContent } from './document-store.ts';
import { PDF_MEDIA_TYPE, refuseUnlessPdf } from './pdf.ts';

/**
 * Keeps a PDF for a laboratory. A content that the laboratory already has is not kept twice: the document
 * that stands is the answer.
 * @throws AppError `wrong-media-type` for what is not a whole PDF
 */
export async function addDocument(
  context: Context,
  upload: { laboratoryId: string; name: string; content: Buffer },
): Promise<DocumentRow> {
  if (!context.dataDir) throw new Error('This context has no folder for documents');
  refuseUnlessPdf(upload.content);
  const sha256 = await keepContent(context.dataDir, upload.content);
  const { laboratoryId, name } = upload;
  const standing = await documentByContent(context.database, sha256, laboratoryId);
  if (standing) return standing;
  try {
    return await inAct(context, { kind: 'document.add', laboratoryId }, async (act) => {
      const id = newId(context);
      const row = { id, sha256, mediaType: PDF_MEDIA_TYPE, size: upload.content.length, name, laboratoryId };
      await insertRow(documentModel(context.database), row);
      act.record({ subject: { type: 'document', id }, after: row });
      return row;
    });
  } catch (error) {
    // The same file sent twice at once: the first one stands.
    const first =
      error instanceof UniqueConstraintError &&
      (await documentByContent(context.database, sha256, laboratoryId));
    if (first) return first;
    throw error;
  }
}
