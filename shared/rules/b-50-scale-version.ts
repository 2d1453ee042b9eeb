import { effectOnU, severityOf } from './b-24-notices-included.ts';
import type { ChainFacts, LinkFacts } from './facts.ts';
import { certificateText, percentText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ChainRuleOf } from './rule.ts';

/**
 * The version of the mass scale is the same along the chain, or converted where it changes: by the notice that maps
 * one to the other. Severity is by the effect on u at the step. A notice that was in force and left out is reported at
 * its link (B-24), and not here again.
 */
export const scaleVersionConstant: ChainRuleOf = {
  id: 'B-50',
  title: 'Mass scale version constant or converted',
  scope: 'chain',
  severity: 'critical',
  verdicts: ['today'],
  sentences: {
    constant: 'Every step of the chain stands on {scales}.',
    converted: 'The chain goes from scale to scale ({scales}) by notice {notices}.',
    'not converted':
      'Certificate {certificate} stands on {scale}, its reference {reference} on {other}, and the value was used as printed: by notice {notices} that is {effect} of u. Convert the value, or state the scale version it rests on.',
    'no notice':
      'Certificate {certificate} stands on {scale}, its reference {reference} on {other}; no notice on record takes one to the other.',
    'not stated': 'Certificate {certificate} does not state the version of the mass scale it stands on.',
    'no uncertainty':
      'Certificate {certificate} stands on {scale}, its reference {reference} on {other}; without its U the effect is unknown.',
    'at a link':
      'The scale version changes at a link where a notice was left out, and is reported there (B-24).',
    none: 'No certificate of the chain states a version of the mass scale.',
  },
  judge(chain) {
    if (chain.values.every((value) => value.scaleVersion === null)) return doesNotApply('none');
    const links = chain.links.filter((link) => link.role === 'reference' && link.usedAs !== 'class limit');
    const steps = links.filter(isStep);
    const bare = steps.filter((link) => link.usedAs !== 'by notice');
    const unreported = bare.filter((link) => link.scaleMap && link.notices.length === 0);
    const [worst] = unreported.sort((a, b) => (effectOf(b) ?? Infinity) - (effectOf(a) ?? Infinity));
    if (worst) return judgeStep(worst);
    const unmapped = steps.find((link) => link.scaleMap === null);
    if (unmapped) return cannotBeJudged('no notice', textsOf(unmapped));
    const silent = chain.values.find((value) => value.scaleVersion === null);
    if (silent) return cannotBeJudged('not stated', { certificate: certificateText(silent) });
    if (bare.length > 0) return doesNotApply('at a link');
    const notices = [...new Set(steps.flatMap((link) => link.scaleMap!.notices))].join(', ');
    const parameters = { scales: scalesOf(chain), notices };
    return steps.length > 0 ? holds('converted', parameters) : holds('constant', parameters);
  },
};

function isStep({ child, parent }: LinkFacts): boolean {
  return (
    child.scaleVersion !== null && parent.scaleVersion !== null && child.scaleVersion !== parent.scaleVersion
  );
}

function effectOf(link: LinkFacts): number | null {
  return link.scaleMap && effectOnU(link, link.scaleMap);
}

function judgeStep(link: LinkFacts) {
  const effect = effectOf(link);
  if (effect === null) return cannotBeJudged('no uncertainty', textsOf(link));
  return fails('not converted', { ...textsOf(link), effect: percentText(effect) }, severityOf(effect));
}

function textsOf({ child, parent, scaleMap }: LinkFacts): Record<string, string> {
  return {
    certificate: certificateText(child),
    reference: certificateText(parent),
    scale: child.scaleVersion ?? '',
    other: parent.scaleVersion ?? '',
    notices: scaleMap?.notices.join(', ') ?? '',
  };
}

function scalesOf(chain: ChainFacts): string {
  return [...new Set(chain.values.flatMap((value) => value.scaleVersion ?? []))].join('; ');
}
