/** Findings of the retrofit check: what happened, and what to do next. */
export const retrofitFindings = {
  'finding.product-missing.title': 'Nothing chosen yet',
  'finding.product-missing.body':
    'Choose the lamp, kit or {=fixture} that goes in; the check starts from its sheet.',
  'finding.supply-outside-rating.title': 'Supply outside the rating',
  'finding.supply-outside-rating.body':
    '{supplyVolts:V} is outside the {ratedVoltsMin:V} to {ratedVoltsMax:V} that the product is rated for. Choose one that is rated for this supply.',
  'finding.supply-unknown.title': 'Supply volts not known',
  'finding.supply-unknown.body':
    'The product takes {ratedVoltsMin:V} to {ratedVoltsMax:V}. Measure at the {=fixture}, or read it at the {=panel}, before anything is ordered.',
  'finding.rated-volts-missing.title': 'Rated volts not given',
  'finding.rated-volts-missing.body':
    'The supply volts that the product is rated for are not known. Read them on its sheet and enter them under parts and prices.',
  'finding.tube-type-against-ballast.title': 'Type {tubeType} does not go here',
  'finding.tube-type-against-ballast.body':
    'What feeds the lamp here is {feeding:word.feeding}, and a Type {tubeType} tube is not made for that. Choose another tube, or another way to do this line.',
  'finding.tube-type-missing.title': 'Type of the lamp not given',
  'finding.tube-type-missing.body':
    'Without its type (A, B, A-B or C) the wiring can not be said. Read it on the lamp’s sheet and enter it.',
  'finding.ballast-unknown.title': 'Ballast not known',
  'finding.ballast-unknown.body':
    'The lamp runs on the ballast that stays. Open one {=fixture} of this type and read it.',
  'finding.ballast-not-listed.title': 'Ballast not on the maker’s list',
  'finding.ballast-not-listed.body':
    'The maker of the tube does not name this ballast ({ballast:word.ballast}): the tube dims, flickers or fails. Choose a tube that lists it, or bypass the ballast.',
  'finding.ballast-list-not-checked.title': 'Compare with the ballast list',
  'finding.ballast-list-not-checked.body':
    'Look the ballast up in the list of the tube’s maker. One ceiling may hold several makes: open more than one.',
  'finding.starter-to-replace.title': 'Starter to replace',
  'finding.starter-to-replace.body': 'Where the ballast has a starter, fit the one that comes with the tube.',
  'finding.lampholder-shunted.title': 'Shunted lampholders',
  'finding.lampholder-shunted.body':
    'This tube needs non-shunted lampholders: in a shunted one line and neutral meet in a dead short. Price new lampholders, or choose a tube that takes these.',
  'finding.lampholder-unknown.title': 'Lampholders not known',
  'finding.lampholder-unknown.body':
    'This tube needs non-shunted lampholders. Test one for continuity across its two contacts (continuity means shunted), or price new ones.',
  'finding.fed-end-missing.title': 'Fed end not given',
  'finding.fed-end-missing.body':
    'Not known whether the tube is fed at one end or at both; the wiring follows from it. Read it on the tube’s sheet.',
  'finding.fed-end-unknown.title': 'Present wiring not known',
  'finding.fed-end-unknown.body':
    'The tube is fed at {fedEnd:word.fed-end}. Read the label in the {=fixture}, open one and look, before lamps are ordered.',
  'finding.fed-end-mismatch.title': 'Wired for another tube',
  'finding.fed-end-mismatch.body':
    'The lampholders are wired to feed at {wired:word.fed-end}, the tube at {fedEnd:word.fed-end}. Choose a tube that fits the wiring, or rewire as a bypass line.',
  'finding.line-volts-at-lampholders.title': 'Supply volts at the lampholders',
  'finding.line-volts-at-lampholders.body':
    'From now on the lampholders carry the supply. Fit the label, and leave it there: someone will change this lamp one day.',
  'finding.one-mode-at-a-time.title': 'One way at a time',
  'finding.one-mode-at-a-time.body':
    'This tube runs on a ballast or on the supply, never both. Wire it as its sheet shows for the supply.',
  'finding.unlisted-kit.title': 'Not listed',
  'finding.unlisted-kit.body':
    'This product is not listed and can not be sold as building lighting. Choose a listed one.',
  'finding.kit-instructions.title': 'By the kit’s own instructions',
  'finding.kit-instructions.body':
    'The listing holds only when the kit is fitted as its instructions say, in a {=fixture} that they name. Keep them with the job.',
  'finding.emergency-unknown.title': 'Emergency light not looked for',
  'finding.emergency-unknown.body':
    'Not known whether there is an emergency pack or an unswitched night light. Look in the {=fixture} and on the drawing before the work is planned.',
  'finding.emergency-on-switched-feed.title': 'Emergency unit on a switched feed',
  'finding.emergency-on-switched-feed.body':
    'Behind a switch or sensor the unit takes every switch-off for a power cut, or never charges. Give it the unswitched feed.',
  'finding.emergency-feed-unknown.title': 'Feed of the emergency unit not said',
  'finding.emergency-feed-unknown.body':
    'Say what feeds the emergency unit once the work is done. It must be the unswitched feed.',
  'finding.emergency-removed.title': 'Emergency unit goes away',
  'finding.emergency-removed.body':
    'This line takes an emergency unit away. Say what lights the way out instead, and have it agreed.',
  'finding.emergency-ballast-stays.title': 'Old emergency ballast',
  'finding.emergency-ballast-stays.body':
    'The emergency ballast that stays is made for fluorescent lamps. Price an emergency driver that is listed for the new product.',
  'finding.emergency-driver-unknown.title': 'Emergency driver not said',
  'finding.emergency-driver-unknown.body':
    'Say what runs the lamp from the battery: an emergency driver that is listed for the new product.',
  'finding.egress-light.title': 'Less light on the way out?',
  'finding.egress-light.body':
    '{before} before, {after} after. Check the light on the way out against the local minimum.',
  'finding.control-unknown.title': 'Control not known',
  'finding.control-unknown.body':
    'Not known what switches or dims this. Look: an old dimmer on LED is the leading call-back.',
  'finding.dimming-unknown.title': 'Way of dimming not given',
  'finding.dimming-unknown.body':
    'There is a control ({control:word.control}), and how the product dims is not known. Read it on its sheet.',
  'finding.dimmer-not-matched.title': 'Dimmer and driver do not match',
  'finding.dimmer-not-matched.body':
    'The {control:word.control} that stays chops the supply of a driver that is not made for it: flicker, then failure. Change the dimmer or the driver.',
  'finding.dimming-lost.title': 'Dimming is lost',
  'finding.dimming-lost.body':
    'The control that stays ({control:word.control}) does not speak to the new driver: it will only switch. Match the two, or say so in the quote.',
  'finding.dimmer-list-not-checked.title': 'Compare with the dimmer list',
  'finding.dimmer-list-not-checked.body':
    'Look the dimmer up in the list of the product’s maker, and try one room before all are done.',
  'finding.dimmer-minimum-load.title': 'Load under the control’s least',
  'finding.dimmer-minimum-load.body':
    'The new load is {watts:W}; the control needs {minimumWatts:W}. It will flicker, or glow when it is off. Choose a control for less load.',
  'finding.control-pair-colours.title': 'Gray may be a neutral',
  'finding.control-pair-colours.body':
    'The negative of a 0–10 V pair is gray in old stock and pink in new, and gray can be a 277 V neutral. Test, do not guess.',
  'finding.step-switching.title': 'Two-step switching',
  'finding.step-switching.body':
    'Two switches light this room in steps. Spread the new {=fixture}s over both legs, or say in the quote that the steps are lost.',
  'finding.breaker-overloaded.title': 'Breaker loaded too far',
  'finding.breaker-overloaded.body':
    'The circuit would draw {ampsAfter:A}, and with {factor} times for continuous load that is more than the {breakerAmps:A} {=breaker}. Split it, or choose less load.',
  'finding.inrush-over-breaker.title': 'Trips at switch-on',
  'finding.inrush-over-breaker.body':
    '{units} units start at once on one {=breaker} that holds {unitsByInrush}. Split them over circuits, or choose a driver with less inrush.',
  'finding.inrush-not-checked.title': 'Inrush not checked',
  'finding.inrush-not-checked.body':
    'The maker’s figure is missing. Ask for the most units on this {=breaker} before {units, plural, one {it is} other {all # are}} ordered.',
  'finding.inrush-over-control.title': 'Too much inrush for the control',
  'finding.inrush-over-control.body':
    '{inrushAmps:A} at switch-on through a control rated for {ratedInrushAmps:A}: its contacts weld. Add a relay, or share the load.',
  'finding.control-inrush-not-checked.title': 'Inrush through the control not checked',
  'finding.control-inrush-not-checked.body':
    'Compare the inrush of all drivers with the listed rating of the {control:word.control}.',
  'finding.disconnect-missing.title': 'No means to disconnect',
  'finding.disconnect-missing.body':
    'The {=fixture} has no means to disconnect it for service. Add one with this work, and price it.',
  'finding.disconnect-unknown.title': 'Means to disconnect not known',
  'finding.disconnect-unknown.body':
    'Look whether the {=fixture} can be disconnected for service. Price a disconnect where it can not.',
  'finding.shared-neutral.title': 'Shared neutral',
  'finding.shared-neutral.body':
    'The neutral can be live with this {=breaker} off. Do not open it until every circuit on it is locked.',
  'finding.shared-neutral-unknown.title': 'Shared neutral not ruled out',
  'finding.shared-neutral-unknown.body':
    'A shared neutral can be live with this {=breaker} off. Take it for one until it has been traced: lock every circuit that may be on it.',
  'finding.suspect-ballast.title': 'Suspect ballasts',
  'finding.suspect-ballast.body':
    'Ballasts without a “No PCBs” mark are taken to hold PCBs. Keep them whole and apart, price their disposal, keep the papers.',
  'finding.suspect-ceiling.title': 'Suspect ceiling',
  'finding.suspect-ceiling.body':
    'The ceiling may hold asbestos. No drilling or lifting until it has been cleared in writing.',
  'finding.no-equipment-ground.title': 'No equipment {=ground}',
  'finding.no-equipment-ground.body':
    'Metal parts must be bonded before the {=fixture} goes back into service. Price the {=ground} with this work.',
  'finding.aluminium-conductors.title': 'Aluminium conductors',
  'finding.aluminium-conductors.body':
    'Use connectors that are rated for aluminium to copper, and price them.',
  'finding.old-wire.title': 'Old wire above the {=fixture}s',
  'finding.old-wire.body':
    'The supply wire here is of an old 60 °C kind. Check what the new product asks for, and price new wire where it asks for more.',
} as const;
