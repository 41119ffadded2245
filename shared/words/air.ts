/** What a field of a reading wants, said when it did not get it. */
export const fields = {
  temperature: 'Give the temperature between −40 and 60 °C.',
  humidity: 'Give the humidity between 0 and 100 %.',
  nothing: 'Give the humidity, or choose dry, normal, damp or wet.',
  future: 'The time lies ahead of now. Give the time of the reading.',
  fileName: 'Give the name of the file, up to 200 characters.',
  noReadings: 'The file gives no reading.',
  columns: 'Every reading needs a time, a temperature or none, and a humidity.',
  fileAhead: (number: number) => `Reading ${number} lies ahead of now. Nothing was brought in.`,
  fileTooOld: (number: number) => `Reading ${number} is more than ten years ago. Nothing was brought in.`,
  sensorHumidity: 'Send the humidity in per cent, 1 to 100, as "humidity".',
  sensorTime: 'Send the time as ISO 8601 with its offset, or as Unix seconds; or leave it out.',
  sensorOld: 'A sensor tells what is at most 14 days ago.',
  sensorBody: 'Send JSON such as {"temperature": 19.5, "humidity": 52}, or the same as form fields.',
  noRoom: 'Choose a room.',
  noBefore: 'There is no earlier reading in this room to be the same as.',
  tooOld: 'Readings can be taken back for 14 days.',
} as const
