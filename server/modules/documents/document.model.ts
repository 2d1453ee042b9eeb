import { DataTypes } from 'sequelize';
import { ID, registerModel } from '#server/db/register-model.ts';

export interface DocumentRow {
  id: string;
  /** Of the content; also its name on disk. */
  sha256: string;
  mediaType: string;
  /** Bytes. */
  size: number;
  /** As the person called it. */
  name: string;
  laboratoryId: string;
}

/** A file that a laboratory keeps in the register. One content stands once per laboratory, and once on disk. */
export const documentModel = registerModel<DocumentRow>('document', {
  id: { type: ID, primaryKey: true },
  sha256: DataTypes.CHAR(64),
  mediaType: DataTypes.STRING(80),
  size: DataTypes.INTEGER.UNSIGNED,
  name: DataTypes.STRING(200),
  laboratoryId: ID,
});
