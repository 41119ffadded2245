import { cautionParts as parts } from '#shared/library/caution-parts'

export type CautionBasis = 'published' | 'published, check the data sheet' | 'common practice'

interface CautionText { text: string, basis: CautionBasis, scope: string }

/** Said once after the cautions of a material or a step, never inside them. */
export const cautionDeferral = 'Follow the product’s safety data sheet and your local rules.'

const health = {
  'vapour': {
    text: `Its vapour can harm you. Open windows on two sides or run an exhaust that blows outdoors. Keep it going while the coat is wet and after you stop. ${parts.noseTires}`,
    basis: 'published', scope: 'every material with a solvent',
  },
  'airing': {
    text: 'The film gives off vapour for days as it hardens. Keep the windows open for two to three days. Tell the neighbours if you share air with them.',
    basis: 'published', scope: 'drying oils and oil varnish',
  },
  'water vapour': {
    text: 'Water-based does not mean vapour-free. A little solvent keeps coming off for days, and from paper or board for months. Keep the air moving.',
    basis: 'published', scope: 'water-based finishes',
  },
  'dust mask': {
    text: 'A dust mask stops dust, not vapour. Vapour needs the right cartridges, fitted to your face and changed in time. A beard breaks the seal. No mask makes up for bad air, and no filter helps with the hardener of two-part paint.',
    basis: 'published, check the data sheet', scope: 'every step with a solvent',
  },
  'sleeping room': {
    text: 'Do not let it dry in a bedroom, or in a room that shares its air with one. The limits for work were not made for sleepers.',
    basis: 'published', scope: 'every material with a solvent or a drying oil',
  },
  'children': {
    text: 'Keep children and pets out till it is dry through and the room has been aired. The same goes for anybody who is pregnant or short of breath. Birds feel it first.',
    basis: 'published, check the data sheet', scope: 'every material with a solvent',
  },
  'symptoms': {
    text: 'Headache, dizzy or stinging eyes? Stop and go out into the air. Tell somebody, and do not go back alone. If it does not pass, call a doctor or your poison line.',
    basis: 'published', scope: 'every material with a solvent',
  },
  'isocyanate': {
    text: 'The hardener in this can give you asthma for life, and you cannot smell it coming. Do not spray it in a studio. A filter mask is not enough: it takes air from outside through a hose. Keep it off your skin. Water-based kinds can hold it too. Ask a work health expert first.',
    basis: 'published', scope: 'materials with isocyanate',
  },
  'epoxy skin': {
    text: 'A skin allergy can start after one touch or after many, and it stays for life. No bare skin. Wear thick nitrile gloves and change them often; cotton ones make it worse. Never wash it off with solvent.',
    basis: 'published', scope: 'epoxy resins and glues',
  },
  'gloves': {
    text: 'Wear gloves until it is fully cured. Half-cured, it harms skin more than it shows.',
    basis: 'published', scope: 'epoxy, two-part finishes and glue with isocyanate',
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
    text: 'Catch the dust where you sand and vacuum it up; do not sweep or blow. Wear a good dust mask. Wood dust can cause cancer of the nose, and fillers may hold silica. Keep dust from flames.',
    basis: 'published, check the data sheet', scope: 'every sanding step',
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
    text: 'Old paint may hold lead. Treat it as lead until an expert has tested it; a home kit does not count. Do not dry-sand, scrape, burn, heat, drill or cut it. Work wet, keep children out, and wash before you eat.',
    basis: 'published', scope: 'old painted objects',
  },
  'green cloth': {
    text: 'Bright green cloth or paper from long ago may hold arsenic. Do not sand, scrape, drill or cut it before an expert has tested it.',
    basis: 'published, check the data sheet', scope: 'old bindings',
  },
  'mould': {
    text: 'Do not brush or sand mould dry. Bag the piece and ask someone who cleans old books or furniture.',
    basis: 'common practice', scope: 'old objects with mould',
  },
  'metal coating': {
    text: 'An old metal coat of unknown kind may hold lead, chrome or cadmium. Do not sand, heat or cut it till an expert has tested it.',
    basis: 'published, check the data sheet', scope: 'old objects with a metal coating',
  },
  'paint stripper': {
    text: 'Do not use a stripper with methylene chloride. It has killed people in closed rooms, and most uses are banned. Ask the shop for another kind.',
    basis: 'published, check the data sheet', scope: 'stripping',
  },
  'ask first': {
    text: 'No sum can say how much air this needs: it harms through the skin, or at very low levels. Keep it off your skin and out of your lungs. Ask a work health expert before you use it.',
    basis: 'published', scope: 'solvents that pass the skin, cause allergy or can cause cancer',
  },
} satisfies Record<string, CautionText>

const fire = {
  'flames': {
    text: `${parts.flamesOut} Open windows and doors on two sides, and do not smoke. Leave all that off till the vapour has gone. It sinks, creeps along the floor and can flash back.`,
    basis: 'published', scope: 'materials that catch fire easily',
  },
  'fan': {
    text: `${parts.fanSparks} Blow clean air across the work from outside the vapour, or use a fan made for it. ${parts.noWarmAir}`,
    basis: 'published', scope: 'materials that catch fire easily',
  },
  'phones': {
    text: `${parts.phonesOut} ${parts.phonesSpark} Write it down when you come out.`,
    basis: 'common practice', scope: 'spray rooms and booths',
  },
  'pouring': {
    text: 'Touch metal to metal when you pour, with both cans earthed. Pour slowly. No open plastic pails.',
    basis: 'published', scope: 'thin solvents in cans',
  },
  'aerosol': {
    text: 'Short bursts, not near flames or children. Open up after you spray. Never pierce or burn the can. Keep it below 50 C.',
    basis: 'published', scope: 'spray cans',
  },
  'oily rags': {
    text: `${parts.ragsHeat} Never ball, bag or bin them. ${parts.ragsWhere} ${parts.ragsAll}`,
    basis: 'published', scope: 'every material with a drying oil',
  },
  'waste can': {
    text: 'Put waste with finish on it in a metal can with a lid at once. Take it out of the house each day.',
    basis: 'published', scope: 'every material with a solvent or a drying oil',
  },
  'mixed residue': {
    text: 'Clean out old overspray before you change the kind of finish. Some mixes can set themselves on fire, such as lacquer over oil.',
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

const texts = { ...fire, ...health, ...work }

export type CautionKey = keyof typeof texts
/** What a caution is about: what can burn, what can harm, or only the work itself. */
export type CautionTopic = 'fire' | 'health' | 'work'
export interface Caution extends CautionText { key: CautionKey, topic: CautionTopic }

const topicOf = (key: CautionKey): CautionTopic => key in fire ? 'fire' : key in health ? 'health' : 'work'

/** Every caution the library knows. Show `cautionDeferral` once after any selection of them. */
export const cautions: readonly Caution[] = (Object.keys(texts) as CautionKey[]).map(key => ({ key, topic: topicOf(key), ...texts[key] }))

/** What stands open wherever room is short: what can burn or maim at the first mistake, in the order it is read. The rest lies one press away. */
const foremost: readonly CautionKey[] = ['ask first', 'isocyanate', 'old paint', 'green cloth', 'flames', 'oily rags', 'exotherm', 'epoxy skin', 'cyanoacrylate', 'paint stripper', 'vapour']

/** Splits cautions into those that stand open and the others; where none is of the foremost, the first stands open. Together they are all of them, each once. */
export function foldCautions<Of extends { key: string }>(given: readonly Of[]): { open: Of[], others: Of[] } {
  const first = foremost.flatMap(key => given.filter(each => each.key === key))
  const open = first.length > 0 ? first : given.slice(0, 1)
  return { open, others: given.filter(each => !open.includes(each)) }
}

/** A caution by key, or null when the word is not one of ours (a studio's own row may hold any). */
export function findCaution(key: string): Caution | null {
  return cautions.find(caution => caution.key === key) ?? null
}
