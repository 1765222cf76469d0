/** A branch circuit: panel, breaker, home run, and its row of luminaires. */
import type { BranchCircuit } from '@/lib/circuits/schema/electrical';
import { formatLength, formatNumber, formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { Box, Breaker, Label, Lamp, Wire } from './symbols';

export interface SolvedBranch {
  breakerAmps: number | null;
  size: string | null;
  dropPct: number | null;
  amps: number | null;
  units: number;
}

const DRAWN = 6;

export function describeBranch(circuit: BranchCircuit, solved: SolvedBranch, settings: ShopSettings): string {
  return (
    `From the panel through a ${solved.breakerAmps ?? circuit.breakerAmps} ampere breaker, ` +
    `${formatLength(circuit.metres, settings)} of ${solved.size ? formatWireSize(solved.size) : 'cable'}, to ${solved.units} ` +
    `${circuit.luminaire || 'luminaires'} at ${formatLength(circuit.spacingMetres, settings)} spacing.`
  );
}

export function BranchDiagram({
  circuit,
  solved,
  settings,
}: {
  circuit: BranchCircuit;
  solved: SolvedBranch;
  settings: ShopSettings;
}) {
  const drawn = Math.min(solved.units, DRAWN);
  const panel = settings.basis === 'us' ? 'panel' : 'board';
  const x = (index: number) => 168 + index * (176 / Math.max(1, DRAWN - 1));
  return (
    <svg
      viewBox="0 0 360 176"
      role="img"
      aria-label={describeBranch(circuit, solved, settings)}
      className="block w-full max-w-3xl"
    >
      <Box x={10} y={40} width={64} height={84} />
      <Label x={42} y={34} bold>
        {panel}
      </Label>
      <Label x={42} y={118}>{`${formatNumber(circuit.volts)} V`}</Label>
      <Wire
        points={[
          [18, 64],
          [28, 64],
        ]}
      />
      <Breaker x={42} y={64} basis={settings.basis} />
      <Wire
        points={[
          [56, 64],
          [x(drawn - 1), 64],
        ]}
      />
      <Label x={42} y={86}>{`${solved.breakerAmps ?? circuit.breakerAmps} A`}</Label>
      <Wire
        points={[
          [74, 100],
          [x(drawn - 1), 100],
        ]}
        dashed
      />
      <Label x={78} y={114} anchor="start">
        N
      </Label>
      {Array.from({ length: drawn }, (_, index) => (
        <g key={index}>
          <Wire
            points={[
              [x(index), 64],
              [x(index), 100],
            ]}
          />
          <Lamp x={x(index)} y={82} />
        </g>
      ))}
      <Label x={82} y={54} anchor="start">
        {solved.size ? formatWireSize(solved.size) : '–'}
      </Label>
      <Label x={350} y={48} anchor="end">{`${solved.units} × ${formatNumber(circuit.voltAmps)} VA`}</Label>
      <Label
        x={10}
        y={146}
        anchor="start"
      >{`${formatLength(circuit.metres, settings)} to the first, ${formatLength(circuit.spacingMetres, settings)} apart`}</Label>
      <Label x={10} y={166} anchor="start">
        {`${solved.amps === null ? '–' : formatNumber(solved.amps, 2)} A, drop ${solved.dropPct === null ? '–' : formatNumber(solved.dropPct, 1)} %`}
      </Label>
    </svg>
  );
}
