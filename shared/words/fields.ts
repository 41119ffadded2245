/** What a field wants, said when it did not get it. */
export const fields = {
  email: 'Give an e-mail address, such as name@example.org.',
  passwordGiven: 'Give your password.',
  passwordShort: 'Choose a password of at least 10 characters.',
  passwordLong: 'A password has at most 200 characters.',
  personName: 'Give your name, at most 80 characters.',
  studioName: 'Give the studio a name, at most 80 characters.',
  zone: 'Choose a time zone, such as Europe/London.',
} as const
