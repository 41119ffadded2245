/** What a field of a reading wants, said when it did not get it. */
export const fields = {
  temperature: 'Give the temperature between −40 and 60 °C.',
  humidity: 'Give the humidity between 0 and 100 %.',
  nothing: 'Give the humidity, or choose dry, normal, damp or wet.',
  future: 'The time lies ahead of now. Give the time of the reading.',
  noRoom: 'Choose a room.',
  noBefore: 'There is no earlier reading in this room to be the same as.',
  tooOld: 'Readings can be taken back for 14 days.',
} as const
