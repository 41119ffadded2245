import { studioProblem } from '../bench/planner'
import { judged } from './clock'

// A process of its own: plans so many pieces and prints the most memory it held, MB.
const pieces = Number(process.argv[2])
if (pieces > 0) judged(studioProblem(pieces), { seconds: 2 })
console.log((process.resourceUsage().maxRSS / 1024).toFixed(1))
