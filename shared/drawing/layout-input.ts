/** What the layout needs of a chain: no values, no names. Plain data, so that a worker can take it. */
export interface LayoutNode {
  id: string;
  /** Longest way down to the focus; the focus is 0. */
  tier: number;
  isRoot: boolean;
  hasStub: boolean;
}

export interface LayoutLink {
  child: string;
  parent: string;
  /** Signed share of the focus's variance; null where not computable. */
  flow: number | null;
}

export interface LayoutInput {
  nodes: LayoutNode[];
  links: LayoutLink[];
}

export interface Point {
  x: number;
  y: number;
}

export interface PlacedPlate {
  id: string;
  /** Left edge of the plate itself (its stub reaches out to the left of it), top edge. */
  x: number;
  y: number;
}

/** A link as one stroked line: from the parent's foot to the child's head, straight through each lane. */
export interface PlacedRibbon {
  child: string;
  parent: string;
  points: Point[];
  width: number;
  isToScale: boolean;
  isNegative: boolean;
}

export interface Lane {
  x: number;
  top: number;
  bottom: number;
  width: number;
}

export interface Placement {
  plates: PlacedPlate[];
  ribbons: PlacedRibbon[];
  lanes: Lane[];
  width: number;
  height: number;
}
