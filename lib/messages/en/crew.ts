/** The crew's sheet: the cautions that stand before its first step, acknowledged by name. */
export const crew = {
  'crew.caution.advice':
    'This sheet advises; a licensed person decides. Local code, the authority and the maker’s instructions prevail.',
  'crew.caution.dead.title': 'Dead work',
  'crew.caution.dead.find':
    'Find every supply: switched, unswitched and emergency feeds, a second circuit, battery pack, control pair.',
  'crew.caution.dead.neutral':
    'A shared neutral can be live with your {=breaker} off: do not open it until every circuit on it is locked.',
  'crew.caution.dead.prove':
    'Isolate all, lock and tag, prove the tester, test line to neutral, line to {=ground}, neutral to {=ground} (and line to line), prove the tester again. Let capacitors discharge; unplug the battery. Qualified persons only.',
  'crew.caution.live.title': 'Readings are live work',
  'crew.caution.live.how':
    'Qualified person, protective equipment, rated meter. De-energise, connect meter or clamp, energise, read, de-energise.',
  'crew.caution.live.string':
    'Never open a running constant-current string: its driver rises to open-circuit volts, and reconnecting it live destroys LEDs.',
  'crew.caution.live.mains':
    'Mains-side readings are asked only of crew marked qualified for them; others record “not measured”. Disconnect drivers before an insulation test.',
  'crew.caution.lampholder': 'Where lampholders are rewired, the modification label stays in the {=fixture}.',
  'crew.caution.ballast':
    'Old ballasts without a “No PCBs” mark are suspect: do not open them; keep them apart.',
  'crew.caution.lamps': 'Old lamps hold mercury: carry them whole, box them, keep the recycling certificate.',
  'crew.caution.ceiling':
    'A suspect ceiling may hold asbestos: do not drill or lift it before it has been cleared.',
  'crew.caution.emergency':
    'Emergency lighting: keep the egress light that the local minimum asks for, and use listed emergency drivers only.',
  'crew.caution.control-pair':
    'A 0–10 V pair can look like a neutral, and a grey wire can be a 277 V neutral: test, do not guess.',
  'crew.bench': 'Field-built; not a listed luminaire or kit.',
} as const;
