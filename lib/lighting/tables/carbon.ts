/** Carbon of grid electricity. Factors change every year: the shop's own stands above these. */
export interface CarbonFactor {
  area: string;
  year: number;
  kgCo2PerKilowattHour: number;
  /** Edition and where it was read; "from memory" where it was not. */
  source: string;
}

/** Kilograms in a pound, exactly. */
export const KG_PER_POUND = 0.45359237;
const perMegawattHour = (pounds: number) => (pounds * KG_PER_POUND) / 1000;

const EGRID = 'US EPA eGRID2022, total output rate (GHG Equivalencies Calculator, Table 1), read in a copy';

export const CARBON_FACTORS: readonly CarbonFactor[] = [
  {
    area: 'US average',
    year: 2022,
    kgCo2PerKilowattHour: perMegawattHour(823.1),
    source: 'US EPA eGRID2022, national average 823.1 lb/MWh, read in a public repository',
  },
  {
    area: 'US average',
    year: 2018,
    kgCo2PerKilowattHour: perMegawattHour(947),
    source: 'US EPA eGRID2018, national average 947 lb/MWh, read in an article',
  },
  { area: 'US, AKGD', year: 2022, kgCo2PerKilowattHour: perMegawattHour(1052.1), source: EGRID },
  { area: 'US, AKMS', year: 2022, kgCo2PerKilowattHour: perMegawattHour(495.8), source: EGRID },
  { area: 'US, AZNM', year: 2022, kgCo2PerKilowattHour: perMegawattHour(776), source: EGRID },
  {
    area: 'UK',
    year: 2025,
    kgCo2PerKilowattHour: 0.177,
    source: 'UK government conversion factors 2025, electricity generation, read in an article (kg CO2e)',
  },
  {
    area: 'UK',
    year: 2024,
    kgCo2PerKilowattHour: 0.20705,
    source: 'UK government conversion factors 2024, electricity generation, read in an article (kg CO2e)',
  },
];
