/** Names of the steps of "how it was figured", by the engine's key. */
export const working = {
  'working.reference-resistance': 'Resistance as listed',
  'working.resistance-at-temperature': 'Resistance at its temperature',
  'working.voltage-drop': 'Voltage drop',
  'working.voltage-drop-percent': 'Voltage drop of the supply',
  'working.cable-loss': 'Heat lost in the cable',
} as const;
