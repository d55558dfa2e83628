/** Where care can hurt someone. */
export type Hazard =
  | 'water-near-mains'
  | 'heat-mat'
  | 'lamp'
  | 'broken-tube'
  | 'mould'
  | 'feed'
  | 'plant-protection'
  | 'lifting'
  | 'eating'
  | 'seed';

/**
 * The usual caution for each hazard, in our own words. Local rules and a licensed electrician come first.
 *
 * @remarks
 * Broken tube: after US EPA guidance on cleaning up a broken fluorescent lamp. Mould: after the US EPA's mould
 * course (dry within 24–48 h). Lamps and eyes: after the risk groups of IEC 62471:2006. The rest is common practice
 * in the trade, with no source.
 */
export const hazardWords: Readonly<Record<Hazard, string>> = {
  'water-near-mains':
    'Keep plugs and timers above the water line, let every cable hang in a drip loop, and use a residual-current device. Switch off at the wall before you reach behind.',
  'heat-mat':
    'Run a heat mat on its thermostat with nothing on top but the flat; never fold or cover it, and retire it when it is damaged.',
  lamp: 'Switch the lamp off and let it cool before you reach in, and do not look into the LEDs.',
  'broken-tube':
    'A broken fluorescent tube holds mercury: people and pets out, air the room for ten minutes, scoop it up without a vacuum cleaner, and ask your local authority where it goes.',
  mould:
    'Wear a mask when you clear mould, dry what is wet within two days, and watch cold walls: air that plants like can be too damp for the building.',
  feed: 'Follow the label of the feed and local rules first; wear gloves for the concentrate and keep it from children.',
  'plant-protection':
    'The label and local rules come first: use only what is allowed on this crop, and keep the waiting time before anyone eats it.',
  lifting:
    'A full flat is heavy and slops: use both hands, a clear way and a second person for the top shelf.',
  eating:
    'Be sure that this plant, and this part of it, is edible; wash hands, scissors and harvest in drinking water.',
  seed: 'Dressed seed is not food: wash your hands after sowing, and keep it from children and pets.',
};
