/**
 * The sentences of the cautions that are also said alone: in a call, at a start, on a tag, beside a key. Whoever warns of rags, flames, phones, fans,
 * old ground or a shut room draws the words from here, so that all say the same; `cautions.ts` makes the full texts of them.
 */
export const cautionParts = {
  ragsHeat: 'Oily rags heat up on their own and can catch fire hours later.',
  ragsWhere: 'Lay them flat in one layer outdoors, away from walls, till they are stiff. Or put them under water in a metal can with a lid, for the waste depot.',
  ragsAll: 'The same goes for pads, towels, steel wool, drop sheets, spray filters and the sander bag.',
  flamesOut: 'Before you open it, put out flames and pilot lights. Switch off heaters, stoves and motors.',
  fanSparks: 'A house fan in the vapour can spark.',
  noWarmAir: 'No heater and no warm air while the film is wet.',
  phonesOut: 'Phones, tablets and chargers stay out of the spray area.',
  phonesSpark: 'They can spark, and they are not made for vapour.',
  devicesSpark: 'Phones, tablets and chargers can spark, and they are not made for vapour.',
  noseTires: 'Your nose is no guide: it tires, and some vapour has no smell.',
  /** What is asked of whoever looks into a shut room. */
  lookIn: 'Exhaust on? Smell or stinging: stay out.',
  spreads: 'There is no exhaust: the vapour may spread.',
  /** What can light vapour, as a list within a sentence. */
  ignition: 'flames, pilot lights, heaters and motors',
  /** What is left alone on old ground, as a list within a sentence. */
  untested: 'no sanding, scraping, heating, piercing or cutting',
} as const
