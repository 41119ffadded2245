/** Names of makers, brands, shops, sites and people behind the figures. They may stand in tests/outside and nowhere else. */
export const makers: readonly string[] = [
  // Makers and their brands, as they stand in the sheets and pages that were read.
  'Jotun', 'Fenomastic', 'Alkydprimer', 'Hempel', 'Hempadur', 'Hempalin', 'Epifanes', 'Golden Artist', 'Golden Polymer', 'General Finishes', 'Minwax', 'DuraSeal', 'PoloPlaz', 'Waterlox', 'Zinsser', 'Rust-Oleum',
  'Winsor & Newton', 'Titebond', 'Franklin', 'Permabond', 'West System', 'Wessex', 'LePage', '3M', 'Hi-Strength', 'Dulux', 'Plaid', 'Real Milk', 'Old Fashioned Milk', 'Diamond Vogel', 'Rohm & Haas', 'Aeroglaze', 'Socomore',
  'Elcometer', 'Blast-One', 'Basic Coatings', 'Kansai', 'Jeffco', 'Vaisala', 'Kestrel', 'Great Lakes', 'Pontiac Paint', 'StewMac', 'Utrecht', 'DAP', 'Bryze', 'Columbia Industrial', 'Ingal',
  // Brands a hand may slip into, though none of their sheets was read.
  'Liquitex', 'Mod Podge', 'Rustins', 'Varathane', 'Gorilla', 'Araldite', 'Loctite', 'Krylon', 'Osmo', 'Liberon', 'Elmer\'s', 'Bondo', 'Sherwin', 'Behlen', 'Mohawk',
  // Sites, magazines and people.
  'Just Paint', 'MITRA', 'WOODWEB', 'LumberJocks', 'CAMEO', 'Sawmill Creek', 'Canadian Woodworking', 'Popular Woodworking', 'Picture Framing Magazine', 'goldenleafproducts', 'watergild', 'gildingstudio', 'goldleafer', 'greenyplace', 'blisstulle',
  'diydata', 'nostberg', 'getbirdly', 'secbond', 'penturners', 'jaazz', 'liveandletdiecast', 'Book_Arts', 'Flexner', 'Snyder', 'Hingst', 'Rash', 'Arcata', 'Cleveland Heights', 'paintmeplaid', 'woodfloordoctor', 'diygeeks', 'engineerfix',
]

const escaped = (name: string) => name.replaceAll(/[.*+?^${}()|[\]\\]/g, '\\$&')
// Words of other trades too, and so only meant as a name when written as one.
const capitalOnly = new Set(['3M', 'DAP', 'MITRA', 'CAMEO', 'Plaid', 'Rash', 'Gorilla', 'Franklin', 'Mohawk', 'Ingal', 'Great Lakes', 'Osmo'])
// What stands beside these letters belongs to a word, an identifier or the base64 of a digest, where short names turn up by chance.
const patterns = makers.map(name => ({ name, pattern: new RegExp(`(?<![A-Za-z0-9_+/])${escaped(name)}(?![A-Za-z0-9+/=])`, capitalOnly.has(name) ? '' : 'i') }))

/** The names of makers that stand in a text. */
export function makersIn(text: string): string[] {
  return patterns.filter(({ pattern }) => pattern.test(text)).map(({ name }) => name)
}
