import type { z } from 'zod';
import { decimalText } from '#shared/decimal.ts';
import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';
import { abilitiesFor } from '#server/policy/permission.ts';
import { readsInFull, type User } from '#server/policy/user.ts';
import { seesHistory } from '#server/policy/value-view.ts';
import { presentCalibrationRow } from './calibration-list.queries.ts';
import type { CalibrationSheet, SheetLine } from './calibration-sheet.queries.ts';
import {
  readCalibration,
  withdrawCalibrationPermission,
  type CalibrationSubject,
} from './calibrations.policy.ts';

type Response = z.infer<typeof CalibrationResponse>;

/**
 * The sheet as this person may see it: whoever reads the issuer or the registrant in full sees every line, a
 * holder their own lines only (a certificate may cover several customers), and the budget is the issuer's.
 */
export function presentCalibration(
  sheet: CalibrationSheet,
  user: User,
  subject: CalibrationSubject,
): Response {
  const { head } = sheet;
  const seesAll = readsInFull(user, subject.issuerId) || readsInFull(user, subject.registeredById);
  const lines = sheet.lines.filter((line) => seesAll || readsInFull(user, line.holderId));
  return {
    calibration: {
      ...presentHead(sheet),
      // A single customer's sheet counts and names what that customer sees.
      weights: new Set(lines.map((line) => line.standardId)).size,
      firstRegistryNo: lines[0]?.registryNo ?? head.firstRegistryNo,
    },
    revisions: sheet.revisions,
    lines: lines.map((line) => ({
      ...presentLine(line, sheet, readsInFull(user, subject.issuerId)),
      // The weight's other calibrations are its holder's to tell.
      newer: seesHistory(user, line) ? newerThan(line, sheet) : null,
    })),
    abilities: abilitiesFor(user, subject, [readCalibration, withdrawCalibrationPermission]),
  };
}

function presentHead({ head }: CalibrationSheet): Response['calibration'] {
  const {
    registeredById,
    registeredByCode,
    registeredByName,
    documentId,
    documentName,
    documentSize,
    recordedAt,
    ...rest
  } = head;
  const { method, decisionRule, signatory, reason, contentSha256, ...row } = rest;
  return {
    ...presentCalibrationRow(row),
    method,
    decisionRule,
    signatory,
    reason,
    contentSha256,
    registeredBy: { id: registeredById, code: registeredByCode, name: registeredByName },
    document:
      documentId === null ? null : { id: documentId, name: documentName ?? '', size: documentSize ?? 0 },
    recordedAt: recordedAt.toISOString(),
  };
}

function presentLine(
  line: SheetLine,
  { references, components }: CalibrationSheet,
  seesBudget: boolean,
): Omit<Response['lines'][number], 'newer'> {
  return {
    uid: line.uid,
    line: line.line,
    standard: {
      id: line.standardId,
      registryNo: line.registryNo,
      marking: line.marking,
      nominal: decimalText(line.nominal),
    },
    holder: { id: line.holderId, code: line.holderCode, name: line.holderName },
    quantity: line.quantity,
    medium: line.medium,
    stage: line.stage,
    deviation: decimalText(line.deviation),
    reportedUnit: line.reportedUnit,
    reportedDecimals: line.reportedDecimals,
    reportedUDecimals: line.reportedUDecimals,
    expandedU: textOrNull(line.expandedU),
    k: textOrNull(line.k),
    coverage: textOrNull(line.coverage),
    class: line.class,
    underAccreditation: Boolean(line.underAccreditation),
    state: line.state,
    stateSince: line.stateSince,
    stateReason: line.stateReason,
    references: references
      .filter((reference) => reference.childId === line.id)
      .map(({ childId: _, ...reference }) => reference),
    components: seesBudget
      ? components
          .filter((component) => component.valueId === line.id)
          .map(({ valueId: _, ...component }) => component)
      : null,
  };
}

function newerThan(
  { id, state }: SheetLine,
  { newer }: CalibrationSheet,
): Response['lines'][number]['newer'] {
  const found = state === 'in force' && newer.findLast(({ lineId }) => lineId === id);
  return found ? { revisionId: found.revisionId, certificateNo: found.certificateNo } : null;
}

function textOrNull(value: string | null): string | null {
  return value === null ? null : decimalText(value);
}
