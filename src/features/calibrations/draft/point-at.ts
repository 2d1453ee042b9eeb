import { useDraft } from './draft-context.ts';
import { pointLine } from './points.ts';

/** The message of a field that cannot stand as it is; what is only missing is listed, not shouted at the field. */
export function usePointAt(): (path: string) => string | undefined {
  const { points } = useDraft();
  return (path) => {
    const point = points.find(({ field, kind }) => field === path && kind === 'wrong');
    return point && pointLine(point);
  };
}
