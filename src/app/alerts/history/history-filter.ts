import { alertKinds, type AlertKind } from '@shared/alerts/alert-rule';
import type { HistoryFilter } from './alert-history';

const monthPattern = /^(19|20)\d\d-(0[1-9]|1[0-2])$/;
const idPattern = /^[\da-f]{8}(-[\da-f]{4}){3}-[\da-f]{12}$/i;

/** The filter in an address; what can't be one is left out, as from a link that was cut off. */
export function filterOf(query: {
  readonly shelf?: string | undefined;
  readonly kind?: string | undefined;
  readonly month?: string | undefined;
}): HistoryFilter {
  const { shelf, kind, month } = query;
  return {
    shelfId: idPattern.test(shelf ?? '') ? shelf : undefined,
    kind: alertKinds.find((known: AlertKind) => known === kind),
    month: monthPattern.test(month ?? '') ? month : undefined,
  };
}
