import { DataTypes } from 'sequelize';
import type { NoticeKind } from '#shared/contracts/notices.ts';
import { GRAMS, ID, registerModel } from '#server/db/register-model.ts';

export interface NoticeRow {
  id: string;
  issuerId: string;
  number: string;
  kind: NoticeKind;
  title: string;
  reason: string;
  fromScaleId: string;
  toScaleId: string | null;
  effectiveOn: string;
  madeKnownOn: string;
  threshold: string | null;
  replacesId: string | null;
}

export const noticeModel = registerModel<NoticeRow>('notice', {
  id: { type: ID, primaryKey: true },
  issuerId: ID,
  number: DataTypes.STRING(40),
  kind: DataTypes.STRING(20),
  title: DataTypes.STRING(160),
  reason: DataTypes.TEXT,
  fromScaleId: ID,
  toScaleId: ID,
  effectiveOn: DataTypes.DATEONLY,
  madeKnownOn: DataTypes.DATEONLY,
  threshold: DataTypes.STRING(400),
  replacesId: ID,
});

export interface NoticeTermRow {
  noticeId: string;
  n: number;
  quantity: 'mass' | 'conventional mass' | null;
  performedFrom: string | null;
  performedTo: string | null;
  nominalFrom: string | null;
  nominalTo: string | null;
  /** Grams per kilogram. */
  addedU: number;
}

export const noticeTermModel = registerModel<NoticeTermRow>(
  'notice_term',
  {
    noticeId: { type: ID, primaryKey: true },
    n: { type: DataTypes.TINYINT, primaryKey: true },
    quantity: DataTypes.STRING(20),
    performedFrom: DataTypes.DATEONLY,
    performedTo: DataTypes.DATEONLY,
    nominalFrom: GRAMS,
    nominalTo: GRAMS,
    addedU: DataTypes.DOUBLE,
  },
  { hasOwnAct: false },
);

export interface NoticeShiftRow {
  noticeId: string;
  n: number;
  performedOn: string;
  /** Grams per kilogram. */
  shift: string;
}

export const noticeShiftModel = registerModel<NoticeShiftRow>(
  'notice_shift',
  {
    noticeId: { type: ID, primaryKey: true },
    n: { type: DataTypes.TINYINT, primaryKey: true },
    performedOn: { type: DataTypes.DATEONLY, primaryKey: true },
    shift: GRAMS,
  },
  { hasOwnAct: false },
);
