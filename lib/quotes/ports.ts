/** Where a draft's lines come from in the running program. */
import { circuitsForQuote } from '@/lib/circuits/queries';
import { priceOfParts } from '@/lib/parts/queries';
import { changeLinesForQuote } from '@/lib/surveys/queries';
import type { SourcePorts } from './sources';

export const livePorts: SourcePorts = {
  changeLines: changeLinesForQuote,
  circuits: circuitsForQuote,
  prices: priceOfParts,
};
