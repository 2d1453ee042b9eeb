import type { ReactNode } from 'react';
import type { Plate, Ribbon } from '#shared/drawing/display-list.ts';
import { PLATE } from '#shared/drawing/geometry.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import type { Pointed } from './use-detail.ts';
import type { View } from './view-of.ts';

const WIDTH = 268;
/** Room that the longest card needs. */
const HEIGHT = 250;
const DISTANCE = 10;

interface DetailCardProps {
  pointed: Pointed;
  nameOf: (uid: string) => string;
  view: View;
  box: { width: number; height: number };
  onEnter: () => void;
  onLeave: () => void;
}

/** What a plate or a link is about, beside it: read at a glance, without opening it. */
export function DetailCard({ pointed, nameOf, view, box, onEnter, onLeave }: DetailCardProps) {
  return (
    <div
      role="tooltip"
      className="absolute z-10 border border-ink bg-raised px-3 py-2 text-sm max-sm:hidden"
      style={{ width: WIDTH, ...placeOf(pointed, view, box) }}
      onMouseEnter={onEnter}
      onMouseLeave={onLeave}
    >
      {'plate' in pointed ? (
        <PlateDetail plate={pointed.plate} />
      ) : (
        <RibbonDetail ribbon={pointed.ribbon} nameOf={nameOf} />
      )}
    </div>
  );
}

/** At the right of the thing; at its left where the frame ends. Kept inside the frame. */
function placeOf(pointed: Pointed, view: View, box: { width: number; height: number }) {
  const isPlate = 'plate' in pointed;
  const { x, y } = isPlate ? pointed.plate : pointed.ribbon.middle;
  const width = isPlate ? PLATE.width : Math.max(16, pointed.ribbon.width);
  const start = (isPlate ? x : x - width / 2) * view.zoom + view.x;
  const end = start + width * view.zoom;
  const fitsRight = end + DISTANCE + WIDTH < box.width;
  const left = fitsRight ? end + DISTANCE : start - DISTANCE - WIDTH;
  const top = y * view.zoom + view.y;
  return {
    left: Math.max(4, Math.min(left, box.width - WIDTH - 4)),
    top: Math.max(4, Math.min(top, box.height - HEIGHT)),
  };
}

function PlateDetail({ plate }: { plate: Plate }) {
  const { node } = plate;
  if (node.type === 'value') return <ValueDetail plate={plate} node={node} />;
  if (node.type === 'source') {
    return (
      <Card heading={node.name}>
        <Line name="Kind">{node.kind}</Line>
        {node.u !== null && (
          <Line name="u">
            <Quantity value={node.u.toPrecision(3)} unit={node.unit} />
          </Line>
        )}
        <Share name="Share" share={node.share} />
      </Card>
    );
  }
  const { broken, caution, notJudged } = node.failing;
  return (
    <Card heading={node.laboratory.name} sub={node.common}>
      <Line name="Holds">
        {node.members.length} values, {node.innerLinks.length} links
      </Line>
      <Line name="Determined">
        <DateText value={node.from} /> to <DateText value={node.to} />
      </Line>
      {broken > 0 && <Line name="Broken">{broken}</Line>}
      {caution > 0 && <Line name="Caution">{caution}</Line>}
      {notJudged > 0 && <Line name="Not judged">{notJudged}</Line>}
      <Share name="Share" share={node.share} />
      <Share name="Own share" share={node.localShare} />
      <Line name="">press to open it in place</Line>
    </Card>
  );
}

function ValueDetail({ plate, node }: { plate: Plate; node: Extract<Plate['node'], { type: 'value' }> }) {
  return (
    <Card heading={node.registryNo} sub={`certificate ${node.certificateNo}`} isMono>
      <Share name="Share" share={node.share} />
      <Share name="Own share" share={node.localShare} />
      <StandardU name="u stated" value={node.uStated} />
      {node.view === 'full' && <StandardU name="u carried" value={node.uCarried} />}
      {node.view === 'full' && <StandardU name="u now" value={node.uNow} note={node.uOrigin} />}
      <Line name="Determined">
        <DateText value={node.performedEnd} />
      </Line>
      <Line name="Issued">
        <DateText value={node.issuedOn} />
      </Line>
      <Line name="Stands">
        <StateMark state={plate.state}>{node.state}</StateMark>
        {node.stateSince && ` since ${node.stateSince}`}
      </Line>
    </Card>
  );
}

function RibbonDetail({ ribbon, nameOf }: { ribbon: Ribbon; nameOf: (uid: string) => string }) {
  const { link } = ribbon;
  const isJudged = link.role === 'reference';
  return (
    <Card heading={`${nameOf(link.parentUid)} → ${nameOf(link.childUid)}`} isMono>
      {link.role === 'informs' ? (
        <Line name="Share">none: it informs</Line>
      ) : ribbon.look === 'beside' ? (
        <Line name="Share">of the second weight; not drawn</Line>
      ) : (
        <Share name="Share" share={link.flow} isHairline={!ribbon.isToScale} />
      )}
      <Line name={link.sensitivity === null ? 'Links' : 'Sensitivity'}>
        {link.sensitivity === null
          ? `${link.of.length} drawn as one`
          : link.sensitivity.toPrecision(6).replace('-', '\u2212')}
      </Line>
      {link.usedEnd && (
        <Line name="Used">
          {link.usedBegin && link.usedBegin !== link.usedEnd && (
            <>
              <DateText value={link.usedBegin} /> to{' '}
            </>
          )}
          <DateText value={link.usedEnd} />
        </Line>
      )}
      {link.usedAs && <Line name="Used as">{link.usedAs}</Line>}
      {isJudged && (
        <Line name="At use">
          <StateMark state={link.conduct} />
        </Line>
      )}
      {isJudged && (
        <Line name="Today">
          <StateMark state={link.today} />
        </Line>
      )}
    </Card>
  );
}

interface CardProps {
  heading: string;
  sub?: string | null;
  isMono?: boolean;
  children: ReactNode;
}

function Card({ heading, sub, isMono = false, children }: CardProps) {
  return (
    <>
      <p className={isMono ? 'font-mono' : 'font-serif text-base'}>{heading}</p>
      {sub && <p className="text-ink-2">{sub}</p>}
      <dl className="mt-1 grid grid-cols-[5.5rem_minmax(0,1fr)] gap-x-2">{children}</dl>
    </>
  );
}

function Line({ name, children }: { name: string; children: ReactNode }) {
  return (
    <>
      <dt className="text-ink-2">{name}</dt>
      <dd>{children}</dd>
    </>
  );
}

function Share({
  name,
  share,
  isHairline = false,
}: {
  name: string;
  share: number | null;
  isHairline?: boolean;
}) {
  const { decimalMark } = usePreferences();
  return (
    <Line name={name}>
      {share === null ? 'unknown' : shareText(share, decimalMark, 2)}
      {isHairline && share !== null && ', not to scale'}
    </Line>
  );
}

/** A standard uncertainty in grams, with where it comes from. */
function StandardU({ name, value, note }: { name: string; value: number | null; note?: string }) {
  return (
    <Line name={name}>
      {value === null ? (
        'unknown'
      ) : (
        <Quantity value={value.toFixed(15)} kind="uncertainty" coverageFactor={1} shownIn="auto" />
      )}
      {note && <span className="text-ink-2"> {note}</span>}
    </Line>
  );
}
