export type CautionBasis = 'published' | 'published, check the data sheet' | 'common practice'

interface CautionText { text: string, basis: CautionBasis, scope: string }

/** Said once after the cautions of a material or a step, never inside them. */
export const cautionDeferral = 'Follow the product\'s safety data sheet and your local rules.'

const health = {
  'vapour': {
    text: 'This gives off vapour you should not breathe. Work with open air on two sides or an exhaust, and keep it going while the coat is wet and after you stop.',
    basis: 'published', scope: 'every material with a solvent',
  },
  'water vapour': {
    text: 'Water-based does not mean vapour-free. A little solvent keeps coming off for days. Keep the air moving.',
    basis: 'published', scope: 'water-based finishes',
  },
  'dust mask': {
    text: 'A dust mask stops dust, not vapour. Vapour needs the right cartridges, fitted to your face and changed in time, and still needs fresh air.',
    basis: 'published', scope: 'every step with a solvent',
  },
  'sleeping room': {
    text: 'Do not let it dry in a bedroom, or in a room that shares its air with one.',
    basis: 'published', scope: 'every material with a solvent or a drying oil',
  },
  'children': {
    text: 'Keep children, pregnant people and animals out until it is fully dry and the room has been aired.',
    basis: 'published', scope: 'every material with a solvent',
  },
  'symptoms': {
    text: 'Headache, dizziness or stinging eyes: stop, go out into the air, tell somebody. Do not go back alone.',
    basis: 'published', scope: 'every material with a solvent',
  },
  'isocyanate': {
    text: 'The hardener in this can give asthma that stays for life, and you cannot smell it coming. Never spray it in a studio. A filter mask is not enough. Keep it off your skin.',
    basis: 'published', scope: 'materials with isocyanate',
  },
  'epoxy skin': {
    text: 'A skin allergy can start after one touch or after many, and it stays. No bare skin: thick gloves, changed often. Never wash it off with solvent.',
    basis: 'published', scope: 'epoxy resins and glues',
  },
  'part-cured dust': {
    text: 'Do not sand it before it is fully cured. The dust of half-cured resin harms skin and lungs.',
    basis: 'published', scope: 'epoxy resins and glues',
  },
  'cyanoacrylate': {
    text: 'It bonds skin at once and its fume stings eyes and nose. Keep your face away and the air moving. Never wipe it up with cotton or wool: the cloth can get hot and smoke.',
    basis: 'published', scope: 'cyanoacrylate glue',
  },
  'sanding dust': {
    text: 'Catch the dust where you sand and vacuum it up; do not sweep or blow. Wear a dust mask. Keep dust from flames.',
    basis: 'published', scope: 'every sanding step',
  },
  'casein lime': {
    text: 'Wet, it is alkaline like lime: it burns eyes and dries skin. Wear gloves and glasses when you mix it. It stains oak dark.',
    basis: 'common practice', scope: 'casein paint and glue',
  },
  'ammonia': {
    text: 'It can give off ammonia. Open up, and leave if your eyes sting. Never mix it with bleach.',
    basis: 'published, check the data sheet', scope: 'latex and some water-based glues',
  },
  'old paint': {
    text: 'Old paint may hold lead. Until somebody qualified has tested it, treat it as lead: do not dry-sand, scrape, burn or heat it.',
    basis: 'published', scope: 'old painted objects',
  },
  'green cloth': {
    text: 'Old bright-green cloth or paper may hold arsenic. Do not sand, scrape or cut it before it has been tested.',
    basis: 'published, check the data sheet', scope: 'old bindings',
  },
  'paint stripper': {
    text: 'Do not use a stripper with methylene chloride.',
    basis: 'published', scope: 'stripping',
  },
} satisfies Record<string, CautionText>

const fire = {
  'flames': {
    text: 'Put out flames and pilot lights and switch off heaters and motors before you open it, and leave them off until no vapour is left. The vapour sinks, creeps along the floor and can flash back.',
    basis: 'published', scope: 'materials that catch fire easily',
  },
  'fan': {
    text: 'A house fan in the vapour can spark. Blow clean air across the work from outside the vapour, or use a fan made for it.',
    basis: 'published', scope: 'materials that catch fire easily',
  },
  'pouring': {
    text: 'Touch metal to metal when you pour, with both cans earthed. Pour slowly. No open plastic pails.',
    basis: 'published', scope: 'thin solvents in cans',
  },
  'aerosol': {
    text: 'Short bursts, not near flames or children. Never pierce or burn the can. Keep it below 50 C.',
    basis: 'published', scope: 'spray cans',
  },
  'oily rags': {
    text: 'Oily rags heat up by themselves and can catch fire hours later. Never ball, bag or bin them. Lay them flat in one layer outdoors, or put them under water in a lidded metal can. Pads, towels, steel wool and the sander bag too.',
    basis: 'published', scope: 'every material with a drying oil',
  },
  'waste can': {
    text: 'Put waste with finish on it into a covered metal can and empty the can every day.',
    basis: 'published', scope: 'every material with a solvent or a drying oil',
  },
  'mixed residue': {
    text: 'Clean out old overspray before you change the kind of finish. Some mixes, such as lacquer over drying oil, light themselves.',
    basis: 'published', scope: 'sprayed lacquers and enamels',
  },
  'exotherm': {
    text: 'Mixed resin in a deep cup makes its own heat, can smoke and even catch fire. Mix small amounts and spread them out. Put a hot cup outdoors.',
    basis: 'published', scope: 'epoxy resins and glues',
  },
  'glue pot': {
    text: 'A glue pot scalds. Warm it in water, never over a bare flame, and do not leave it on when you go.',
    basis: 'common practice', scope: 'hide glue, glue size and bole',
  },
} satisfies Record<string, CautionText>

const work = {
  'blush': {
    text: 'In damp air the fast solvent chills the film and it turns milky. Wait for drier air, or use the slow thinner its maker names.',
    basis: 'published', scope: 'shellac and lacquers',
  },
  'amine blush': {
    text: 'A waxy film can come up while it cures. Wash it off with water before sanding or the next coat, or the coat will not stick.',
    basis: 'published, check the data sheet', scope: 'epoxy resins',
  },
  'forbidden middle': {
    text: 'Recoat soon or wait till it is hard. In between, the new coat wrinkles the old one.',
    basis: 'published, check the data sheet', scope: 'spray enamel',
  },
  'wax early': {
    text: 'Wax over paint that is not hard lifts it. And nothing sticks on top of wax.',
    basis: 'common practice', scope: 'wax finishes',
  },
  'over damp paint': {
    text: 'Over paint that is still damp inside it clouds.',
    basis: 'published, check the data sheet', scope: 'water-based varnish',
  },
  'cover slow oil': {
    text: 'It hardens by taking in air. Do not cover it or shut it away for the first two days, nor for long in the first week.',
    basis: 'published, check the data sheet', scope: 'drying oils and oil varnish',
  },
  'blocking': {
    text: 'Two dry faces can still stick together for weeks. Keep something non-stick between them.',
    basis: 'common practice', scope: 'acrylic paint and decoupage medium',
  },
  'skin hides wet': {
    text: 'Thick paint skins over. Dry on top can be wet inside for weeks.',
    basis: 'published, check the data sheet', scope: 'thick acrylic and oil paint',
  },
  'old stock': {
    text: 'Old stock may never harden. Date the bottle and try a drop on glass first.',
    basis: 'published, check the data sheet', scope: 'shellac and liquid hide glue',
  },
  'goes off': {
    text: 'Mixed, it keeps for a day or so and then goes off or grows mould. Mix what you need.',
    basis: 'common practice', scope: 'casein, paste and glue size',
  },
  'one try': {
    text: 'There is no second try: the faces grab where they touch.',
    basis: 'published, check the data sheet', scope: 'contact cement and cyanoacrylate',
  },
  'keep warm': {
    text: 'Glue that gets too cold before it has dried turns white and weak. The room must stay warm all night, not only when you close the clamps.',
    basis: 'published, check the data sheet', scope: 'white and yellow wood glue',
  },
  'dry air': {
    text: 'It cures with water from the air and the wood. In dry air it hardly cures: dampen one face lightly or raise the humidity.',
    basis: 'published, check the data sheet', scope: 'glue that cures with moisture',
  },
} satisfies Record<string, CautionText>

const texts = { ...health, ...fire, ...work }

export type CautionKey = keyof typeof texts
export interface Caution extends CautionText { key: CautionKey }

/** Every caution the library knows. Show `cautionDeferral` once after any selection of them. */
export const cautions: readonly Caution[] = (Object.keys(texts) as CautionKey[]).map(key => ({ key, ...texts[key] }))

/** A caution by key, or null when the word is not one of ours (a studio's own row may hold any). */
export function findCaution(key: string): Caution | null {
  return cautions.find(caution => caution.key === key) ?? null
}
