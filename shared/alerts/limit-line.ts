import { brokenSide, type LimitRule } from './alert-rule';
import type { AlertContext, LampSpan } from './lamp-plan';

interface Limits {
  readonly on: number;
  readonly off: number;
  readonly settleMs: number;
  readonly rampMs: number;
}

/**
 * The limit of a rule over time, as evaluated and as drawn behind a chart.
 *
 * @remarks
 * Air needs time to follow the lamps, so the limit does too, in the way that forgives: where a change of the lamps
 * loosens the limit it does so at once; where it tightens it, the old limit stays for `settleMs` and then moves
 * evenly to the new one within `rampMs`. A limit that is missing in one state counts as infinitely far away.
 *
 * @param rule - A limit rule.
 * @param context - The planned lamps; asked once a lamp span, so that long series stay cheap.
 * @returns A function of the instant [ms] giving the limit, in the unit of the series; plus or minus Infinity where
 * there is none.
 */
export function limitLine(rule: LimitRule, context: AlertContext): (at: number) => number {
  const side = brokenSide(rule.kind);
  const limits = limitsOf(rule, side * Infinity);
  let span: LampSpan = { on: false, since: Infinity, until: -Infinity };
  let steadyFrom = Infinity;
  let steady = NaN;
  return (at) => {
    if (!(at >= span.since && at < span.until)) {
      span = context.lampsAt(at);
      steady = span.on ? limits.on : limits.off;
      const before = span.on ? limits.off : limits.on;
      const tightens = side * (before - steady) > 0;
      steadyFrom = tightens ? span.since + limits.settleMs + limits.rampMs : span.since;
    }
    return at >= steadyFrom ? steady : tightening(limits, span, at);
  };
}

/** The limit at `at`, after a change of the lamps that tightens it and before it has got there. */
function tightening(limits: Limits, span: LampSpan, at: number): number {
  const [from, to] = span.on ? [limits.off, limits.on] : [limits.on, limits.off];
  const rampedMs = at - span.since - limits.settleMs;
  if (rampedMs <= 0 || !Number.isFinite(from)) return from;
  return from + ((to - from) * rampedMs) / limits.rampMs;
}

function limitsOf(rule: LimitRule, none: number): Limits {
  switch (rule.kind) {
    case 'aboveRange':
      return { ...rule, on: rule.lampsOn.high ?? none, off: rule.lampsOff.high ?? none };
    case 'belowRange':
      return { ...rule, on: rule.lampsOn.low ?? none, off: rule.lampsOff.low ?? none };
    case 'lampDark':
      return { ...rule, on: rule.limit, off: none };
    case 'lampLit':
      return { ...rule, on: none, off: rule.limit };
    default:
      return { on: rule.limit, off: rule.limit, settleMs: 0, rampMs: 0 };
  }
}
