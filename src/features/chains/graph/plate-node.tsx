import { memo } from 'react';
import { Handle, Position, type NodeProps } from 'reactflow';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { nominalUnit } from '#shared/numbers/nominal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import type { Plate, Stub } from '#shared/drawing/display-list.ts';
import { PLATE, STUB_REACH } from '#shared/drawing/geometry.ts';

export interface PlateData {
  plate: Plate;
  isSelected: boolean;
}

const STUB_LENGTH = 34;

/** A value of the chain, or an effect it shares, as a small plate; what it adds of its own enters from the left. */
export const PlateNode = memo(function PlateNode({ data }: NodeProps<PlateData>) {
  const { plate, isSelected } = data;
  const isRoot = plate.node.type === 'value' && plate.node.rootKind !== null;
  const edge = plate.isFocus || isSelected ? 'border-brass' : 'border-ink';
  const rule =
    plate.node.type === 'source' ? 'border border-dashed' : isRoot ? 'border-3 border-double' : 'border';
  return (
    <div
      className={`relative cursor-pointer bg-raised text-left ${rule} ${edge} ${isSelected || plate.isFocus ? 'outline outline-brass' : ''} ${plate.isFaint ? 'opacity-35' : ''}`}
      style={{ width: PLATE.width, height: PLATE.height }}
    >
      <Handle type="source" position={Position.Bottom} className="invisible" isConnectable={false} />
      <Handle type="target" position={Position.Top} className="invisible" isConnectable={false} />
      {plate.stub && <StubMark stub={plate.stub} />}
      {plate.mark && <Noticed word={plate.mark} />}
      <div className="flex h-full flex-col justify-between px-2 py-1">
        {plate.node.type === 'value' ? (
          <ValueFace plate={plate} node={plate.node} />
        ) : (
          <SourceFace node={plate.node} />
        )}
      </div>
    </div>
  );
});

function ValueFace({ plate, node }: { plate: Plate; node: Extract<Plate['node'], { type: 'value' }> }) {
  return (
    <>
      <div className="flex items-baseline justify-between gap-1 text-xs">
        <span className="font-mono text-sm">
          {plate.isFocus && <span className="sr-only">The weight itself: </span>}
          {node.registryNo}
          <span className="sr-only">, certificate {node.certificateNo}</span>
        </span>
        <span className="truncate text-ink-2">
          {node.rootKind ?? <NominalAndClass nominal={node.nominal} weightClass={node.class} />}
        </span>
      </div>
      <div className="flex items-center justify-between gap-1">
        <Quantity
          value={node.deviation}
          expandedUncertainty={node.expandedU}
          coverageFactor={node.k}
          kind="deviation"
          shownIn="auto"
          face="serif"
        />
        <StateMark state={plate.state} isMarkOnly>
          {plate.state}, {node.state}
        </StateMark>
      </div>
      <div className="flex justify-between gap-1 text-xs whitespace-nowrap text-ink-2">
        <span title={node.issuer.name}>
          <DateText value={datedTo(node.performedEnd, node.datePrecision)} /> · {issuerText(node)}
        </span>
        {node.state !== 'in force' && (
          <span aria-hidden="true" className={STANDING[node.state]}>
            {node.state === 'not yet in force' ? 'not yet' : node.state}
          </span>
        )}
      </div>
    </>
  );
}

const STANDING = {
  superseded: 'text-caution',
  withdrawn: 'text-broken',
  'not yet in force': 'text-unjudged',
} as const;

/** Characters of an issuer's name that fit beside the date. */
const LONGEST_NAME = 16;

/** The issuer's code where its name would be cut, or where the value's standing needs the room. */
function issuerText({ issuer, state }: Extract<Plate['node'], { type: 'value' }>): string {
  return state === 'in force' && issuer.name.length <= LONGEST_NAME ? issuer.name : issuer.code;
}

/** A word on the plate's lower edge, with a mark: colour alone says nothing. */
function Noticed({ word }: { word: string }) {
  return (
    <span className="absolute -bottom-2 left-2 flex items-center gap-1 bg-raised px-1 text-xs leading-4 whitespace-nowrap text-brass">
      <svg viewBox="0 0 8 8" className="size-2" aria-hidden="true">
        <path d="M4 0 8 4 4 8 0 4Z" fill="currentColor" />
      </svg>
      {word}
    </span>
  );
}

function SourceFace({ node }: { node: Extract<Plate['node'], { type: 'source' }> }) {
  return (
    <>
      <div className="flex items-baseline justify-between gap-1 text-xs">
        <span className="font-mono text-sm whitespace-nowrap">{node.registryNo ?? node.kind}</span>
        <span className="truncate text-ink-2">shared effect</span>
      </div>
      <div className="line-clamp-2 text-xs">{node.name}</div>
    </>
  );
}

/** Nominal in the unit it is spoken of, with the class: "1 kg E2". */
export function NominalAndClass({ nominal, weightClass }: { nominal: string; weightClass: string | null }) {
  return (
    <>
      <Quantity value={nominal} shownIn={nominalUnit(nominal)} />
      {weightClass && ` ${weightClass}`}
    </>
  );
}

/** A date no more exact than it is known. */
function datedTo(day: string, precision: 'day' | 'month' | 'year'): string {
  return { day, month: day.slice(0, 7), year: day.slice(0, 4) }[precision];
}

function StubMark({ stub }: { stub: Stub }) {
  const { decimalMark } = usePreferences();
  const height = stub.height ?? 14;
  const look =
    stub.height === null
      ? 'border border-dashed border-ink-3'
      : stub.isNegative
        ? 'border border-dashed border-ink-2'
        : stub.isToScale
          ? 'bg-local'
          : 'bg-ink-3';
  return (
    <div
      className="absolute top-1/2 flex -translate-y-1/2 items-center justify-end gap-1"
      style={{ right: PLATE.width, width: STUB_REACH }}
    >
      <span className="font-mono text-xs whitespace-nowrap text-ink-2">
        {stub.share === null ? '?' : stub.isToScale ? shareText(stub.share, decimalMark, 0) : ''}
      </span>
      <span className={look} style={{ width: STUB_LENGTH, height, flexShrink: 0 }} />
    </div>
  );
}
