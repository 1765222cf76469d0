/** Findings on readings that are off, and the words for causes and places. */
export const faultFinderFindings = {
  'finding.high-resistance-joint.title': 'Bad joint: fire risk',
  'finding.high-resistance-joint.body':
    'A joint with {ohms:ohm} would explain the readings: up to {watts:W} heat it. Switch off, open it, remake it, and read again before the circuit stays on.',
  'finding.polarity-reversed.title': 'Polarity reversed',
  'finding.polarity-reversed.body':
    'A feed is connected the wrong way round. Switch off and exchange its two conductors.',
  'finding.shorted-leds-overdrive.title': 'LEDs shorted, the others overdriven',
  'finding.shorted-leds-overdrive.body':
    '{leds, plural, one {One LED looks} other {# LEDs look}} shorted: what is in series with it carries more than it is made for. Switch off and replace that part.',
  'finding.supply-volts-not-as-drawn.title': 'Driver volts not as drawn',
  'finding.supply-volts-not-as-drawn.body':
    'A driver that gives {volts:V} would explain the readings. Read its label and its setting before anything else is changed.',
  'finding.supply-amps-not-as-drawn.title': 'Driver current not as drawn',
  'finding.supply-amps-not-as-drawn.body':
    'A driver set to {amps:A} would explain the readings. Read its label and its setting before anything else is changed.',
  'finding.no-cause-explains.title': 'No single cause explains this',
  'finding.no-cause-explains.body':
    '{readings, plural, one {One reading is} other {# readings are}} off, and no single cause explains all. Read again, look for two faults, or for wiring that is not as drawn.',
  'finding.readings-not-separable.title': 'One more reading would tell',
  'finding.readings-not-separable.body':
    'It may be {first:word.fault} or {second:word.fault}. Read {quantity:word.quantity} {at:word.place} {index}.',
  'finding.place-not-separable.title': 'One more reading would tell the place',
  'finding.place-not-separable.body':
    'It lies between segments {from} and {to}. Read {quantity:word.quantity} {at:word.place} {index}.',
  'finding.causes-look-alike.title': 'Look at the place itself',
  'finding.causes-look-alike.body':
    'It may be {first:word.fault} or {second:word.fault}: no further reading tells. Switch off and look.',
  'finding.measure-safely.title': 'Connect the meter without power',
  'finding.measure-safely.body':
    'Switch off, connect the meter, switch on, read. Never open a constant-current string that runs: it arcs at the driver’s full volts.',
  'finding.band-not-whole.title': 'Bands leave something out',
  'finding.band-not-whole.body':
    'At {ends, plural, one {one end} other {# ends}} of the tolerances this circuit has no operating point. The bands do not count them.',

  'word.fault.joint-in-feed': 'a bad joint in a feed',
  'word.fault.joint-in-tape': 'a bad joint in the tape',
  'word.fault.joint-in-string': 'a bad joint in the string',
  'word.fault.feeder-resistance': 'a feed that is longer or thinner than drawn',
  'word.fault.supply-setting': 'another driver setting',
  'word.fault.feed-missing': 'a feed that is not connected',
  'word.fault.feed-reversed': 'a feed the wrong way round',
  'word.fault.open-rail': 'a broken rail of the tape',
  'word.fault.open-segments': 'segments that are dark',
  'word.fault.open-string': 'an open string',
  'word.fault.open-module': 'a module that is open or the wrong way round',
  'word.fault.shorted-leds': 'shorted LEDs',
  'word.fault.shorted-modules': 'shorted modules',
  'word.quantity.volts': 'volts',
  'word.quantity.amps': 'amps',
  'word.place.feed': 'at the driver, feed',
  'word.place.cut': 'at segment or module',
  'word.place.string': 'at string',
  'word.place.positive-conductor': 'along the positive conductor of feed',
  'word.place.negative-conductor': 'along the negative conductor of feed',
} as const;

export const faultFinderWorking = {
  'working.reading-band': 'Highest that the furthest reading can be',
  'working.cause-residual': 'What the best cause leaves unexplained',
  'working.joint-watts': 'Heat in the joint',
  'working.reading-apart': 'How far the next reading tells them apart',
} as const;
