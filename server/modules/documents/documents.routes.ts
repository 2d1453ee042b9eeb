import { z } from 'zod';
import { Id } from '#shared/ids.ts';
import { DocumentQuery, DocumentResponse } from '#shared/contracts/calibrations.ts';
import { notFound } from '#server/http/app-error.ts';
import { route, type Route } from '#server/http/route.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import { documentById, laboratoriesOfDocument } from './document.queries.ts';
import { addDocument } from './document.service.ts';
import { readContent } from './document-store.ts';
import { addDocumentPermission, readDocument } from './documents.policy.ts';
import { contentDisposition } from './file-name.ts';
import { PDF_MAXIMUM_BYTES, PDF_MEDIA_TYPE } from './pdf.ts';

export const documentRoutes: Route[] = [
  route({
    method: 'post',
    path: '/api/documents',
    summary: 'Keeps a PDF (the request body) for a laboratory; the same content is kept once.',
    permission: addDocumentPermission,
    query: DocumentQuery,
    upload: { mediaTypes: [PDF_MEDIA_TYPE], maximumBytes: PDF_MAXIMUM_BYTES },
    subject: async (context, { query }) => {
      await refuseUnknownLaboratory(context, query.laboratory);
      return { laboratoryId: query.laboratory };
    },
    act: (context, { query, upload }) =>
      addDocument(context, { laboratoryId: query.laboratory, name: query.name, content: upload }),
    response: DocumentResponse,
    present: ({ id, name, size, sha256 }) => ({ id, name, size, sha256 }),
    status: 201,
    location: ({ id }) => `/api/documents/${id}`,
  }),
  route({
    method: 'get',
    path: '/api/documents/:documentId',
    summary: 'The document itself.',
    permission: readDocument,
    params: z.object({ documentId: Id }),
    subject: async (context, { params }) => {
      const document = await documentById(context.database, params.documentId);
      if (!document) throw notFound('This document');
      const subject = { document, laboratoryIds: await laboratoriesOfDocument(context.database, document) };
      // Not even that it exists is told to others.
      if (!readDocument.allows(context.user, subject)) throw notFound('This document');
      return subject;
    },
    act: async (context, _input, { document }) => {
      if (!context.dataDir) throw new Error('This context has no folder for documents');
      return { document, content: await readContent(context.dataDir, document.sha256) };
    },
    response: z.instanceof(Buffer),
    present: ({ content }) => content,
    send: ({ document, content }, response) => {
      response.setHeader('Content-Type', document.mediaType);
      response.setHeader('Content-Disposition', contentDisposition(document.name));
      response.setHeader('X-Content-Type-Options', 'nosniff');
      response.end(content);
    },
  }),
];
