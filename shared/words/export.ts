/** What the studio's archive and its sheet in Settings say. */
export const exportWords = {
  title: 'Take everything along',
  says: 'One file with all the studio has told: pieces, acts, coats, tests, readings, materials, schedules, people, photographs and data sheets, as tables that any program reads, and three sheets for a spreadsheet. Passwords, secret addresses and browsers that are called are left out.',
  act: 'Download the archive',
  readMeName: 'READ-ME.txt',
  readMe: (studio: string, at: string) => [
    `${studio}, as it stood at ${at}.`,
    '',
    'pieces.csv, acts.csv, readings.csv: for a spreadsheet. Times are by the studio’s clock. A cell that begins with an apostrophe would otherwise be read as a formula.',
    'studio.json, people.json, tables/*.json: every row. Times are ISO 8601 in UTC, temperatures in degrees Celsius, humidity between 0 and 1, lengths in metres, areas in square metres.',
    'files/: photographs and data sheets; the number in front is the id in tables/attachment.json.',
    'Left out: passwords, sessions, invitations, secret addresses, browsers that are called and what was sent to them.',
    '',
  ].join('\n'),
  replaced: 'corrected or taken back',
  pieceColumns: ['number', 'piece', 'batch', 'batch begins', 'finishing schedule', 'order', 'due', 'promised', 'gone'],
  actColumns: ['number', 'done', 'told', 'act', 'pieces', 'by', 'note', 'details'],
  readingColumns: ['room', 'at', 'temperature, degrees C', 'humidity, %', 'how', 'by'],
} as const
