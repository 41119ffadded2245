import { cautionParts } from '#shared/library/caution-parts'
import type { CallKind, Channel } from '#shared/terms'

/** What Settings says about calls: where they go, which are on, and what became of them. */
export const callSettings = {
  title: 'Calls',
  here: 'Calls in this browser',
  call: 'Call me here',
  stop: 'Stop calling here',
  stopThere: 'Stop calling there',
  alsoHere: 'Your browsers',
  unnamed: 'A browser without a name',
  since: (time: string) => `since ${time}`,
  which: 'Which calls',
  byMail: (address: string) => `Every call that is on also goes by mail to ${address}.`,
  kinds: {
    'last moment to start': { label: 'Last moment to start', hint: 'Half an hour before a window shuts for all of them, and again for as many as can still be done.' },
    'ready': { label: 'Ready', hint: 'When the next step over a film is due.' },
    'before you leave': { label: 'Before you leave', hint: 'Half an hour before the studio shuts: what shuts overnight, what is outdoors, heating, lids, glue pot, rags.' },
    'check the room': { label: 'Time to check the spray room', hint: 'When a shut room is not expected to hold much vapour any more. It stays shut until somebody has looked.' },
    'promise slipping': { label: 'A promise slips', hint: 'Once, when a promised date is likely to pass, with its cause and whom to tell.' },
    'rags': { label: 'Oily rags', hint: `This call cannot be switched off. ${cautionParts.ragsHeat} So it goes to everybody until somebody answers.` },
    'vapour': { label: 'Solvent work begins', hint: 'This call cannot be switched off. It tells everybody which room to stay out of, and where flames and heaters must be off.' },
  } satisfies Record<CallKind, { label: string, hint: string }>,
  quiet: {
    title: 'Quiet hours',
    on: 'Let calls wait',
    hint: 'Calls wait until they end. What nobody needs any more by then is not sent. Calls about fire come all the same.',
    from: 'From',
    to: 'To',
    waiting: 'Looking up your quiet hours.',
    failed: 'Your quiet hours could not be looked up.',
  },
  outbox: 'Mails kept here',
  outboxWhy: 'No mail server is set, so mails are written to a folder beside the database.',
  outboxServer: 'Mails go out by the mail server.',
  outboxEmpty: 'No mail has been written yet.',
  sent: 'What became of the newest calls',
  sentEmpty: 'No call has been made yet.',
  columns: { call: 'Call', to: 'To', channel: 'By', status: 'What became of it', when: 'When', subject: 'Subject' },
  channels: { push: 'browser', mail: 'mail' } satisfies Record<Channel, string>,
  statuses: {
    queued: 'waiting to be sent',
    sending: 'being sent',
    accepted: 'sent',
    unknown: 'perhaps sent',
    gone: 'nobody there',
    failed: 'not sent',
  },
  tryAgainAt: (time: string) => `Next try ${time}.`,
  loading: 'Looking up the calls',
  notLoaded: 'The calls could not be looked up.',
} as const

/** How things stand with calls in one browser, and what to do about each. */
export const pushStates = {
  'looking': 'Looking whether this browser is called.',
  'subscribed': 'Calls reach this browser, also while the page is closed.',
  'not subscribed': 'Calls do not reach this browser yet.',
  'dismissed': 'The browser asked and got no answer. Press again, then allow notifications.',
  'denied': 'This browser has been told not to show notifications from here. Allow them in its settings for this page, then press again.',
  'not supported': 'This browser cannot be called. Some phones can once the page is put on their home screen. Mail still reaches you.',
  'needs https': 'Calls to a browser need an https address. This page was opened over plain http: ask whoever runs the server for a certificate, or rely on mail.',
  'no service worker': 'The part of the page that receives calls did not start. Private windows often refuse it. Load the page again, or use another browser.',
  'push service unreachable': 'The browser could not reach its maker’s push service. Check the connection, then press again.',
  'server refused': 'The studio did not take this browser’s address.',
  'server not reached': 'The studio cannot be reached. Press again in a moment.',
} as const

export type PushState = keyof typeof pushStates
