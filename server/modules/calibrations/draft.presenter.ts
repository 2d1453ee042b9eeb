import { Decimal, decimalText } from '#shared/decimal.ts';
import type { DraftResponse } from '#shared/contracts/drafts.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { abilitiesFor } from '#server/policy/permission.ts';
import type { User } from '#server/policy/user.ts';
import {
  issueCalibrationPermission,
  readDraftPermission,
  sendDraftPermission,
  writeDraftPermission,
  type DraftSubject,
} from './calibrations.policy.ts';
import type { DraftStandard } from './draft-facts.queries.ts';
import { presentReferences } from './references.presenter.ts';
import type { ShownDraft } from './show-draft.service.ts';

/** A draft as the sheet shows it. */
export function presentDraft(shown: ShownDraft, user: User, subject: DraftSubject): DraftResponse {
  const { draft, document, standards, references, points, checks } = shown;
  return {
    id: draft.id,
    version: draft.version,
    state: draft.state,
    laboratory: draft.laboratory,
    content: draft.content,
    document: document && { id: document.id, name: document.name, size: document.size },
    standards: standards.map((standard) => presentStandard(standard, shown)),
    references: presentReferences(references, user),
    points,
    checks,
    revisionId: draft.revisionId,
    updatedAt: draft.updatedAt,
    updatedBy: draft.updatedBy,
    abilities: abilitiesFor(user, subject, [
      readDraftPermission,
      writeDraftPermission,
      sendDraftPermission,
      issueCalibrationPermission,
    ]),
  };
}

/** The last value is the one of the kind that the first line naming the weight gives. */
function presentStandard(standard: DraftStandard, { draft }: ShownDraft): DraftResponse['standards'][number] {
  const line = draft.content.lines.find((one) => one.standardId === standard.id);
  const last = standard.lastValues[line?.quantity ?? 'conventional mass'];
  return {
    id: standard.id,
    registryNo: standard.registryNo,
    marking: standard.marking,
    nominal: decimalText(standard.nominal),
    class: standard.class,
    maximumPermissibleError: limitInGrams(standard),
    lastValue: last
      ? {
          deviation: decimalText(last.deviation),
          expandedU: last.expandedU && decimalText(last.expandedU),
          performedEnd: last.performedEnd,
        }
      : null,
  };
}

function limitInGrams(standard: DraftStandard): string | null {
  const limit = standard.class && maximumPermissibleError(standard.class, new Decimal(standard.nominal));
  return limit ? decimalText(limit.div(1000)) : null;
}
