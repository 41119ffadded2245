const opened = (link: string | null, path: string) => link ?? `the address of your studio, followed by ${path}`

/** Mails that are no calls. */
export const letters = {
  reset: {
    subject: 'A new password',
    text: (link: string | null, path: string) => [
      'Somebody, most likely you, asked for a new password for this address. Choose one here within an hour:', '', opened(link, path), '',
      'If it was not you, do nothing: the old password stays.',
    ].join('\n'),
  },
  invitation: (studio: string) => ({
    subject: `${studio} asks you in`,
    text: (link: string | null, path: string) => [`${studio} keeps track of what is wet and what may be handled, and asks you in. The link opens for two weeks, once:`, '', opened(link, path)].join('\n'),
  }),
} as const
