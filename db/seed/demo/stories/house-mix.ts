import type { Calendar } from '~~/db/seed/demo/calendar'
import type { Told } from '~~/db/seed/demo/play'

/** The studio's own brown: paint from the library, tinted with a paste whose name and share stay among owner and makers. */
export function houseMix({ at }: Calendar): Told[] {
  const mixedAt = at(-28, '9:30')
  return [{ at: mixedAt, play: player => player.mix({
    at: mixedAt, by: 'owner', name: 'House brown', base: { key: 'heavy-body-acrylic', parts: 11 },
    own: {
      name: 'Walnut tint paste', parts: 2, kind: 'paint', hardening: 'water', solvent: 'water', contents: [], mustLieLevel: false, gloves: false, hazards: '',
      figures: { 'reference temperature': '21', 'reference humidity': '50', 'set-to-touch': '20-40 min', 'ready-to-recoat': '1-2 h', 'dry-to-handle': '2-4 h' },
    },
  }) }]
}
