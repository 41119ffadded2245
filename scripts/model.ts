import { dryingTools } from '#shared/drying/tools'
import { runCommand } from './model/command'
import { readCase } from './model/read-case'
import { runCase } from './model/run-case'

const usage = `npm run --silent model -- FILE.json | -

Predicts when a coat dries: reads one case, or a list of cases, from a file or from standard input (-),
and prints the result, or the list of results, as one JSON value. Uses no database.

A case: { "material": "<starter id>" or a material written out, "appliedAt": ISO, "coat": "thin|normal|full|flood",
  "ground": "porous|primed|sealed|non-absorbent", "airSpeed": m/s, "zone": IANA, "heated": true, "nightDropC": 4,
  "readings": [{ "at": ISO, "tempC": 20, "rh": 0..1 }], "usual": { "tempC", "rh" },
  "tests": [{ "at": ISO, "milestone", "reached" }], "history": [earlier coats], "theta": fixed log speed, "now": ISO }

Ends with 0, or with 2 and one line naming the field that cannot be used.`

const tools = dryingTools()

process.exitCode = runCommand(process.argv.slice(2), usage, (value, place) => runCase(readCase(value, place), tools))
