import { cautionParts } from '#shared/library/caution-parts'
import { cautionDeferral } from '#shared/library/cautions'
import type { VapourPhase } from '#shared/solvent-rooms'
import { ragAnswersListed, ragAnswerTexts } from '#shared/words/rags'
import { asSentence } from '#shared/words/verdict'

/** Every sentence of the calls: what a notification and a mail say. Times arrive as words. */

const pieces = (count: number) => count === 1 ? 'one piece' : `${count} pieces`

/** At most three names, then how many more. */
export function someOf(names: readonly string[]): string {
  const shown = names.slice(0, 3).join(', ')
  return names.length > 3 ? `${shown} and ${names.length - 3} more` : shown
}

interface Work { batch: string, count: number }

/** Said of a room where vapour is. */
const noIgnition = `No ${cautionParts.ignition} in there.`

const what = ({ batch, count }: Work) => `${batch}, ${pieces(count)}.`

export const callWords = {
  lastMoment: {
    title: (by: string) => `Start by ${by}`,
    all: (work: Work, says: string, few: string | null) => `${what(work)} ${asSentence(few ? `${says}, ${few}` : says)}`,
    few: (work: Work, all: number, says: string) => `${what(work)} There is no longer time for all ${all}. ${asSentence(says)}`,
  },
  ready: {
    body: (work: Work) => `${what(work)} Still tacky? Tell us, the time moves.`,
    held: (work: Work) => `${what(work)} Not holding yet? Leave it in and tell us, the time moves.`,
    testTitle: (step: string) => `Touch it first: ${step}`,
    afterTest: (work: Work) => `${what(work)} Touch it first and tell us: the time rests on your test.`,
  },
  leaving: {
    title: (at: string) => `Before you leave at ${at}`,
    shuts: (batch: string, says: string) => `Shuts overnight: ${batch}. ${asSentence(says)}`,
    outdoors: (names: readonly string[]) => `Still outdoors: ${someOf(names)}. Look on the board how to hold them before you bring them in.`,
    heater: (room: string, films: number) => `${room}: ${films === 1 ? 'a film is' : `${films} films are`} still drying. The times count on the heating tonight.`,
    solvent: (room: string) => `${room}: a solvent film is drying. ${noIgnition}`,
    lids: (names: readonly string[]) => `Lids on: ${someOf(names)}.`,
    pot: 'Is the glue pot off?',
    rags: (rooms: readonly string[]) => `Oily rags from ${someOf(rooms)}: say where they are.`,
  },
  rags: {
    title: 'Where are the oily rags?',
    body: (room: string, last: string) => `${room}, last oil at ${last}. ${cautionParts.ragsHeat} ${cautionParts.ragsWhere} ${cautionParts.ragsAll} We ask again until somebody answers. ${cautionDeferral}`,
    sayWhere: `Say where the rags are: ${ragAnswersListed}.`,
    answeredAlready: 'Somebody has answered for these rags already.',
    again: (room: string, last: string) => `Nobody has answered yet. ${callWords.rags.body(room, last)}`,
  },
  vapour: {
    title: (room: string, phase: VapourPhase) => `Keep out of ${room}: ${({ 'begins': 'solvent work begins', 'began': 'solvent work has begun', 'film on': 'a solvent film is on' })[phase]}`,
    body: (room: string, name: string | null, exhaust: boolean, phase: VapourPhase) => `${name ?? 'The bench'} ${({ 'begins': 'begins solvent work', 'began': 'began solvent work some time ago', 'film on': 'has put a solvent film on' })[phase]} in ${room}. ${!exhaust ? cautionParts.spreads : phase === 'begins' ? 'The exhaust is running.' : 'The exhaust was said to run.'} ${noIgnition} ${cautionParts.phonesOut} ${cautionDeferral}`,
    stays: 'This call stays till the room has been opened. Say that you have seen it instead.',
  },
  checkRoom: {
    title: (room: string) => `Time to check ${room}`,
    body: (room: string, name: string) => `${room} is still shut. ${cautionParts.lookIn} ${cautionParts.noseTires} ${name === '' ? 'An owner' : name} looks in and opens it, or leaves it shut.`,
  },
  said: {
    ask: 'You pressed this on the call. Is it so?',
    leave: 'Not that',
    gone: 'This has been told already, or is no longer wanted.',
    close: 'Close',
  },
  notification: {
    coatOn: 'Coat is on',
    stillTacky: 'Still tacky',
    dryEnough: 'Dry enough',
    flatOutdoors: ragAnswerTexts['flat outdoors'],
    inWaterCan: ragAnswerTexts['in water can'],
    unreadableTitle: 'A call from the studio',
    unreadableBody: 'It could not be read here. Look at the board.',
  },
  delivery: {
    quiet: 'Held for quiet hours.',
    notNeeded: 'It was no longer needed before it could be sent.',
    nobodyThere: 'Nobody listens there any more.',
    stopped: 'The server stopped while sending: it may have arrived.',
    browserGone: 'The browser has given up this subscription.',
    pushAnswered: (status: number) => `The push service answered ${status}.`,
    pushUnreachable: 'The push service cannot be reached.',
    pushSilent: 'The push service did not answer in time.',
    pushKeysUnusable: 'The keys of this subscription are not usable.',
    mailAnswered: (status: number) => `The mail server answered ${status}.`,
    mailAddressRefused: 'The mail server does not take this address.',
    mailSilent: 'The mail server did not answer in time.',
    mailUnreachable: 'The mail server cannot be reached.',
    outboxUnwritable: (why: string) => `The outbox cannot be written: ${why}`,
  },
  pushAddress: {
    unreadable: 'The push address cannot be read.',
    notHttps: 'The push address does not begin with https.',
    credentials: 'The push address carries a name or a password.',
    inside: 'The push address points into this network.',
  },
  mail: {
    subject: (title: string, studio: string) => `${title} (${studio})`,
    text: (body: string, link: string | null, studio: string) => [body, '', ...(link ? [link, ''] : []), `You get this mail as a member of ${studio}. Settings say which calls you get.`].join('\n'),
  },
} as const
