import { dateText, isNotAfter, performed, periodOf, type Period } from './days.ts';
import type { ValueFacts } from './facts.ts';
import { rowInForce } from './in-force.ts';
import { certificateText, percentText, statedU } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import type { EffectFacts } from './weight-facts.ts';

/** A branch that brings less of the variance than this is not followed: effort in proportion (VIM 2.41 note 4). */
const SMALLEST_SHARE = 0.01;

/**
 * What a result leaned on beside its references was valid when it was used: a volume is the one on record then, and no
 * effect was determined after it. Branches that hardly contribute are not followed.
 */
export const secondaryBranches: ValueRule = {
  id: 'B-52',
  title: 'Secondary branches valid at use',
  scope: 'value',
  severity: 'minor',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    valid: 'Certificate {certificate} leaned on {names}, which stood on {performed}.',
    'later one':
      'Certificate {certificate} leaned on the volume of {names}, but on {performed} another determination stood on record; weigh with that one.',
    'determined later':
      'Certificate {certificate} of {performed} leaned on {names}, which was determined only on {determined}.',
    undecided:
      'Certificate {certificate} leaned on {names}; the exact day of {performed} would decide which determination stood.',
    'not dated': 'Certificate {certificate} leaned on {names}; when it was determined is not on record.',
    small:
      'What certificate {certificate} leaned on beside its references brings less than {share} of its variance each.',
    none: 'Certificate {certificate} names nothing it leaned on beside its references.',
    'no uncertainty': 'Certificate {certificate} states no U to weigh its secondary branches by.',
  },
  judge(value) {
    const branches = value.budget.effects.filter((effect) => effect.kind !== 'scale version');
    const known = textsOf(value, []);
    if (branches.length === 0) return doesNotApply('none', known);
    const u = statedU(value);
    if (u === null || u === 0) return cannotBeJudged('no uncertainty', known, 'information');
    const large = branches.filter(
      ({ sensitivity, u: own }) => ((sensitivity * own) / u) ** 2 >= SMALLEST_SHARE,
    );
    if (large.length === 0) return doesNotApply('small', known);
    const day = performed(value);
    const of = (standing: Standing) => large.filter((effect) => standingOf(effect, day) === standing);
    const [replaced, late] = [of('replaced'), of('late')];
    if (replaced.length > 0) return fails('later one', textsOf(value, replaced));
    if (late.length > 0) return fails('determined later', textsOf(value, late));
    const [undecided, undated] = [of('undecided'), of('not dated')];
    if (undecided.length > 0) return cannotBeJudged('undecided', textsOf(value, undecided));
    if (undated.length > 0) return cannotBeJudged('not dated', textsOf(value, undated), 'information');
    return holds('valid', textsOf(value, large));
  },
};

type Standing = 'stood' | 'replaced' | 'late' | 'undecided' | 'not dated';

function standingOf(effect: EffectFacts, day: Period): Standing {
  if (effect.determinedOn !== null) {
    const isInTime = isNotAfter(periodOf(effect.determinedOn, 'day'), day);
    if (isInTime === null) return 'undecided';
    if (!isInTime) return 'late';
  }
  if (effect.kind !== 'volume') return effect.determinedOn === null ? 'not dated' : 'stood';
  const [first, last] = [isOnRecord(effect, day.first), isOnRecord(effect, day.last)];
  if (first === null || last === null) return 'not dated';
  if (first !== last) return 'undecided';
  return first ? 'stood' : 'replaced';
}

/** Whether this volume stood on a day, as known then; null where none stood. */
function isOnRecord({ onRecord }: EffectFacts, day: string): boolean | null {
  const standing = (['density', 'volume'] as const).flatMap((kind) => {
    const row = rowInForce(
      onRecord.filter((candidate) => candidate.kind === kind),
      day,
      day,
    );
    return row ? [row] : [];
  });
  return standing.length === 0 ? null : standing.some((row) => row.isThis);
}

function textsOf(value: ValueFacts, effects: readonly EffectFacts[]): Record<string, string> {
  return {
    certificate: certificateText(value),
    performed: dateText(value.performedEnd, value.datePrecision),
    names: effects.map(({ kind, of }) => (kind === 'volume' ? of : `${of} (${kind})`)).join(', '),
    determined: effects.map((effect) => effect.determinedOn ?? '').join(', '),
    share: percentText(SMALLEST_SHARE),
  };
}
