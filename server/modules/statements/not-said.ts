import type { ChainResponse } from '#shared/contracts/chains.ts';

/** What a document of a chain does not say, in every one of them, so that a tick is not read as more than it is. */
export function notSaid(chain: ChainResponse): string[] {
  const { day, known, ruleSet, engine } = chain.question;
  const values = chain.nodes.filter((node) => node.type === 'value');
  const partly = values.filter((node) => node.view === 'statement').length;
  return [
    'It is no judgement of fitness: whether the weight serves a purpose is for those who use it.',
    'It is no verdict of law or of accreditation: both stand above it, and licensed practice decides.',
    'Traceability promises neither that an uncertainty is small enough nor that no mistake was made (JCGM 200:2012, 2.41 note 5; clause from memory).',
    `It says how the register stood on ${day}, as known on ${known}, by rule set ${ruleSet} and engine ${engine}. What was entered later, or never, is not in it.`,
    'A check that holds says that what is recorded answers one question. It does not say that the work behind the record was right.',
    ...(partly === 0
      ? []
      : [
          `Of ${values.length} values, ${partly} ${partly === 1 ? 'is' : 'are'} told as their certificates state them: who holds those weights, and what the checks found in their histories, is not for this reader.`,
        ]),
  ];
}
