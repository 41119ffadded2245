import { runCommand } from './model/command'
import { readRoom } from './vapour/read-room'
import { runRoom } from './vapour/run-room'

const usage = `npm run --silent vapour -- FILE.json | -

Works out what the wet coats of a room do to its air: reads one room, or a list of rooms, from a file or from standard input (-),
and prints the result, or the list of results, as one JSON value. Uses no database. A caution to plan by, never leave to enter.

A room: { "room": { "volumeM3": 40, "airChangesPerHour": 4 or null, "mixingFactor": 1..100 or null (10) },
  "coats": [{ "at": ISO, "vocGramsPerLitre": 450, "carrier": "solvent|water", "thinnerGrams": 0, "coat": "thin|normal|full|flood",
    "areaM2": 3, "spreadM2PerLitre": 10, "touchDryMinutes": 240 or null,
    "solvent": "mineral-spirits" or { "limitMgM3": 350 or null, "ceilingMgM3": 1800, "lelGramsM3": 42 } }],
  "from": ISO, "hours": 24 }

Concentrations and lelShare are of a perfectly mixed room; neededM3PerHour, notClearBefore and band count the mixing factor.
Ends with 0, or with 2 and one line naming the field that cannot be used.`

process.exitCode = runCommand(process.argv.slice(2), usage, (value, place) => runRoom(readRoom(value, place)))
