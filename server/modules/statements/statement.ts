import type { ChainLink, ChainResponse, ChainValue } from '#shared/contracts/chains.ts';
import type { StatementQuery, StatementResponse, StatementStep } from '#shared/contracts/statements.ts';
import { namesOf } from '#shared/drawing/link-order.ts';
import { datedTo } from '#shared/numbers/dated-to.ts';
import { groupBy } from '#shared/group-by.ts';
import { checkRows, failingSentences } from './check-rows.ts';
import { contentOf } from './content.ts';
import { notSaid } from './not-said.ts';
import { summaryOf } from './summary.ts';
import { askedWords, definitionWords, stepWords, weightWords } from './words.ts';

/** Below this share a step is told by the table alone, unless a check of it fails (JCGM 200:2012, 2.41 note 4). */
const WORTH_TELLING = 0.01;

/**
 * The statement of traceability, from a chain as its reader may see it: nothing else goes in, so that nothing else
 * can come out.
 */
export function statementOf(chain: ChainResponse, { verdict }: StatementQuery): StatementResponse {
  const values = chain.nodes.filter((node): node is ChainValue => node.type === 'value');
  const focus = focusOf(chain);
  return {
    kind: 'statement of traceability',
    question: { ...chain.question, verdict },
    title: weightWords(focus),
    asked: askedWords(chain.question),
    definition: definitionWords(chain.definition),
    steps: stepsOf(chain, values),
    summary: summaryOf(chain),
    uncertainty: chain.uncertainty,
    asNowKnown: chain.asNowKnown,
    scaleVersions: [...new Set(values.flatMap((value) => value.scaleVersion ?? []))].sort(),
    rootShares: chain.rootShares.flatMap(({ uid, share }) => {
      const root = values.find((value) => value.uid === uid);
      return root?.rootKind ? [{ uid, registryNo: root.registryNo, rootKind: root.rootKind, share }] : [];
    }),
    sharedEffects: chain.nodes
      .flatMap((node) =>
        node.type === 'source' ? [{ uid: node.uid, name: node.name, share: node.share }] : [],
      )
      .sort((a, b) => Math.abs(b.share ?? 0) - Math.abs(a.share ?? 0)),
    checks: checkRows(chain),
    notSaid: notSaid(chain),
    chainSha256: contentOf(chain).sha256,
  };
}

/** The value that the chain was asked for. */
export function focusOf(chain: ChainResponse): ChainValue {
  return chain.nodes.find(
    (node): node is ChainValue => node.uid === chain.focusUid && node.type === 'value',
  )!;
}

/** From the weight upwards; in a tier what carries more comes first. */
function stepsOf(chain: ChainResponse, values: readonly ChainValue[]): StatementStep[] {
  const names = namesOf(chain);
  const failing = failingSentences(chain);
  const linksOf = groupBy(chain.links, (link) => link.childUid);
  return values
    .toSorted((a, b) => a.tier - b.tier || Math.abs(b.share ?? 0) - Math.abs(a.share ?? 0))
    .map((value) =>
      stepOf(value, linksOf.get(value.uid) ?? [], {
        names,
        failing: failing.get(value.uid) ?? [],
        isFocus: value.uid === chain.focusUid,
      }),
    );
}

function stepOf(
  value: ChainValue,
  links: readonly ChainLink[],
  context: Parameters<typeof stepWords>[2],
): StatementStep {
  const isTold =
    context.isFocus ||
    context.failing.length > 0 ||
    value.share === null ||
    Math.abs(value.share) >= WORTH_TELLING ||
    value.state === 'withdrawn' ||
    links.some((link) => link.conduct === 'broken' || link.today === 'broken');
  const { uid, registryNo, marking, nominal, certificateNo, revisionN, quantity, issuedOn, state } = value;
  const { deviation, expandedU, k, rootKind, scaleVersion, share } = value;
  return {
    ...{ uid, registryNo, marking, nominal, certificateNo, revisionN, quantity, issuedOn, state },
    ...{ deviation, expandedU, k, rootKind, scaleVersion, share },
    class: value.class,
    holder: value.holder?.name ?? null,
    issuer: value.issuer.name,
    determinedOn: datedTo(value.performedEnd, value.datePrecision),
    leanedOn: links.map(
      ({ parentUid, role, usedAs, usedBegin, usedEnd, sensitivity, flow, conduct, today }) => ({
        ...{ uid: parentUid, name: context.names.get(parentUid)!, role, usedAs, usedBegin, usedEnd },
        ...{ sensitivity, flow, conduct, today },
      }),
    ),
    words: isTold ? stepWords(value, links, context) : null,
  };
}
