/**
 * A change to a network whose effect on all others is asked.
 * - `shift`: the value moves by `delta`.
 * - `raise`: an uncertainty is added to the value's local part, in quadrature.
 * - `withdraw`: the value is taken back without successor; what depends on it cannot be computed.
 * - `replace`: whoever leaned on `value` is read as leaning on `by`, which differs from it by `delta`
 *   (successor minus superseded); local parts stay as they were.
 * - `notice`: one shared effect on several values, each with its shift and its sensitivity to the effect, which is not zero. It
 *   enters at the oldest covered values, once per path (`noticeEntries`), and is inherited below through links. On the links in
 *   `alreadyApplied` the child used the corrected value: the notice's shift does not pass them, its uncertainty does.
 */
export type Change =
  | { kind: 'shift'; value: string; delta: number }
  | { kind: 'raise'; value: string; addedStandardUncertainty: number }
  | { kind: 'withdraw'; value: string }
  | { kind: 'replace'; value: string; by: string; delta: number }
  | Notice;

/** One shared effect on several values; see `Change`. Shifts and the uncertainty are in the network's unit. */
export type Notice = {
  kind: 'notice';
  id: string;
  standardUncertainty: number;
  terms: { value: string; shift: number; sensitivity: number }[];
  alreadyApplied?: { child: string; parent: string }[];
};
