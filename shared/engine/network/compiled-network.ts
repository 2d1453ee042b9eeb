/**
 * The network on typed arrays: what every walk runs on. A node is a value (0 to `valueCount - 1`, in the order
 * given) or a source (after the values). A link is one child-parent pair, duplicates already added.
 */
export type CompiledNetwork = {
  valueCount: number;
  nodeCount: number;
  /** Name of a node; networks from arrays without ids use the index as text. */
  idOf: (node: number) => string;
  /** Node of an id, or undefined. */
  nodeOf: (id: string) => number | undefined;
  /** Variance of the node's own part: local part squared, or a source's variance; 0 for group members. */
  ownVariance: Float64Array;
  /** 1 where the local part is not known. */
  unknown: Uint8Array;
  degreesOfFreedom: Float64Array;
  estimateOf: (node: number) => string | undefined;
  /** Index of the node's group, -1 for none, and its place among the members. */
  groupOf: Int32Array;
  placeInGroup: Int32Array;
  groups: CompiledGroup[];
  /** Links of node n are `linkStart[n]` to `linkStart[n + 1] - 1`. */
  linkStart: Int32Array;
  linkParent: Int32Array;
  /** Sensitivity; 0 on a link through a class limit. */
  linkSensitivity: Float64Array;
  /** Standard uncertainty that a class limit brings to the child; 0 on a plain link. */
  linkSpread: Float64Array;
  /** Every node after all its parents; sources and roots come first, by length of the longest path. */
  order: Int32Array;
  /** Place of a node in `order`. */
  position: Int32Array;
};

/** A group on node indices. */
export type CompiledGroup = {
  members: Int32Array;
  covariance: number[][];
  degreesOfFreedom: number;
  estimate: string | undefined;
};
