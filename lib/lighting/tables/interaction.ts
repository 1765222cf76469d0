/**
 * Lighting savings yield: net kWh for each lighting kWh saved, by building and heating, and the heating fuel that takes
 * the place of the lights' heat. Values of the whole Northwest of the US; other climates differ.
 * Source: HVAC Interactive Effects 050712, Bonneville Power Administration, 2012, table "Adjusted kWh (Lighting Savings
 * Yield)", read in a copy.
 */
export const INTERACTION_SOURCE =
  'HVAC Interactive Effects, Bonneville Power Administration, 2012, read in a copy';

export interface Interaction {
  building: string;
  /** By the heating of the building. */
  electricResistance: number;
  heatPump: number;
  fuel: number;
  /** Refrigerated room. */
  refrigerated: number;
  /** Therms of heating fuel that each lighting kWh saved adds, where fuel heats. */
  thermsPerKilowattHour: number;
}

const row = (
  building: string,
  electricResistance: number,
  heatPump: number,
  fuel: number,
  refrigerated: number,
  thermsPerKilowattHour: number,
): Interaction => ({ building, electricResistance, heatPump, fuel, refrigerated, thermsPerKilowattHour });

export const INTERACTION: readonly Interaction[] = [
  row('College or University', 0.68, 0.96, 1.11, 1.3, 0.02138),
  row('School K-12', 0.57, 0.86, 1.0, 1.3, 0.02184),
  row('Hospital', 0.29, 0.65, 0.94, 1.3, 0.03276),
  row('Other health, nursing, clinic', 0.92, 1.02, 1.08, 1.3, 0.00819),
  row('Lodging', 0.69, 0.9, 1.05, 1.3, 0.0182),
  row('Office <20,000 sf', 0.69, 0.96, 1.12, 1.3, 0.02138),
  row('Office 20,000-100,000 sf', 0.92, 1.02, 1.08, 1.3, 0.00819),
  row('Office >100,000 sf', 0.91, 1.02, 1.07, 1.3, 0.00819),
  row('Restaurant', 0.43, 0.73, 0.96, 1.3, 0.02684),
  row('Retail boutique <5,000 sf', 0.76, 0.98, 1.04, 1.3, 0.0141),
  row('Retail 5,000-50,000 sf', 0.68, 0.93, 1.03, 1.3, 0.01774),
  row('Retail big box one-storey', 0.82, 1.03, 1.12, 1.3, 0.01501),
  row('Retail anchor multistorey', 0.71, 0.97, 1.1, 1.3, 0.01956),
  row('Retail mini mart', 0.69, 0.95, 1.05, 1.3, 0.01774),
  row('Retail supermarket', 0.85, 0.97, 1.05, 1.3, 0.01001),
  row('Other commercial', 0.87, 1.02, 1.03, 1.3, 0.00819),
  row('Industrial', 0.61, 0.81, 0.96, 1.3, 0.01774),
  row('Warehouse', 0.61, 0.81, 0.96, 1.3, 0.01774),
  row('Exterior', 1.0, 1.0, 1.0, 1.3, 0),
];
