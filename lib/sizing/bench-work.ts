/** What every field-built assembly carries. */
import type { Finding } from '@/lib/engine/contract';

/** Bench work is neither listed nor certified: whoever reads the answer must know. */
export function fieldBuilt(): Finding {
  return {
    code: 'field-built',
    severity: 'note',
    hard: false,
    message: 'field-built; not a listed luminaire or kit',
    values: {},
    basis: 'common practice',
  };
}
