import { performance } from 'node:perf_hooks'
import { librarySolvents, limitsOf } from '#shared/library/solvents'
import { roomSums } from '#shared/vapour/picture'
import type { NamedCoat } from '#shared/vapour/picture'
import { roomVapour } from '#shared/vapour/room'
import type { VentilatedRoom, WetCoat } from '#shared/vapour/types'
import { chanceFrom } from './chance'

const seed = 20_261_001
const from = Date.UTC(2026, 9, 1, 7)
const hourMs = 3_600_000
const roomCount = 10
const coatCount = 200

interface Bench { rooms: VentilatedRoom[], coats: WetCoat[][] }

/** Coats of every solvent, laid over a working day and the evening before; one in five water-borne, one in twenty of an unknown touch-dry. */
function benchOf(): Bench {
  const chance = chanceFrom(seed)
  const rooms = Array.from({ length: roomCount }, (_, i): VentilatedRoom => ({ volumeM3: 20 + chance() * 100, airChangesPerHour: i === 0 ? null : 0.5 + chance() * 12, mixingFactor: 3 + i % 3 }))
  const coats: WetCoat[][] = rooms.map(() => [])
  for (let i = 0; i < coatCount; i++) {
    coats[i % roomCount]!.push({
      at: Math.round(from + (chance() * 24 - 12) * hourMs),
      carrier: chance() < 0.2 ? 'water' : 'solvent',
      massGrams: 5 + chance() * 150,
      touchDryMinutes: chance() < 0.05 ? null : 10 + chance() * 600,
      limits: limitsOf(librarySolvents[i % librarySolvents.length]!),
    })
  }
  return { rooms, coats }
}

function evaluateAll({ rooms, coats }: Bench): { ms: number, highest: number } {
  const start = performance.now()
  const shares = rooms.map((room, i) => roomVapour(room, coats[i]!, { from, hours: 24 }).healthShare)
  return { ms: performance.now() - start, highest: Math.max(...shares) }
}

/** The same number of coats as the page reads them: figures in doubt, so that each room is reckoned with the likely and with the cautious ones. */
function benchPage(): () => number {
  const chance = chanceFrom(seed)
  const rooms = Array.from({ length: roomCount }, () => ({ volumeM3: 20 + chance() * 100, exhaustM3H: 100 + chance() * 900, airChangesPerHour: null, airMoves: 'measured fan' as const }))
  const coats = rooms.map((_, room) => Array.from({ length: coatCount / roomCount }, (__, i): NamedCoat => ({
    id: `coat ${room} ${i}`, piece: '', material: '', planned: false, at: Math.round(from - chance() * 10 * hourMs), solvent: 'mineral spirits', voc: { low: 350, typical: 450, high: 600 }, spread: { low: 8, typical: 10, high: 12 },
    areaM2: chance(), sizeUnits: 1, size: 'normal', thinnerGrams: 0, sheetTouchMinutes: 60 + chance() * 400, foretoldTouchMinutes: null, sheet: null,
  })))
  return () => {
    const start = performance.now()
    rooms.forEach((room, i) => roomSums(room, true, coats[i]!, { from, hours: 24 }))
    return performance.now() - start
  }
}

/** Evaluates 200 wet coats in 10 rooms over a day, cold and warm, and gives the lines to print. */
export function benchVapour(): string[] {
  const bench = benchOf()
  const first = evaluateAll(bench)
  const warm = Array.from({ length: 41 }, () => evaluateAll(bench).ms).sort((a, b) => a - b)
  const median = warm[20]!
  const page = benchPage()
  const firstPage = page()
  const pages = Array.from({ length: 41 }, page).sort((a, b) => a - b)
  return [
    `vapour: ${coatCount} wet coats of ${librarySolvents.length} solvents in ${roomCount} rooms over 24 hours, seed ${seed}`,
    `  worst share of the limits, mixing counted: ${first.highest.toFixed(1)}`,
    `  first evaluation:         ${first.ms.toFixed(1)} ms`,
    `  warm, median of 41:       ${median.toFixed(1)} ms (fastest ${warm[0]!.toFixed(1)}, slowest ${warm[40]!.toFixed(1)})`,
    `  bar 20 ms: ${(median / 20).toFixed(2)} of it`,
    `  as the page reads them, with the doubt of every figure: first ${firstPage.toFixed(1)} ms, median of 41 ${pages[20]!.toFixed(1)} ms, ${(pages[20]! / 20).toFixed(2)} of the bar`,
  ]
}
