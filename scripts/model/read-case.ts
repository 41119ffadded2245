import type { CoatCase, DryingMaterial, Milestone, Reading, RecoatWindow, RoomAir, TouchTest } from '#shared/drying/types'
import { coatSizes, drivers, grounds } from '#shared/terms'
import { findLibraryMaterial } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { BadField, instantAt, listAt, numberAt, objectAt, oneOfAt, optional, textAt, yesNoAt } from './fields'

/** An earlier coat of the same material in this studio, with the air it stood in. */
export interface EarlierCoat { coat: CoatCase, room: RoomAir, witness: boolean[] }

/** One case of the contract, read and checked. `theta` null: the bench is as the sheet and its earlier coats say. */
export interface ModelCase { material: DryingMaterial, coat: CoatCase, room: RoomAir, history: EarlierCoat[], theta: number | null, now: number }

const longestMinutes = 5_000_000

function readMilestone(field: string, value: unknown): Milestone {
  const fields = objectAt(field, value)
  const minutes = (name: string) => numberAt(`${field}.${name}`, fields[name], 0.001, longestMinutes)
  const rung = {
    name: textAt(`${field}.name`, fields.name),
    driver: oneOfAt(`${field}.driver`, fields.driver, drivers),
    low: minutes('low'), typical: minutes('typical'), high: minutes('high'),
  }
  if (rung.low > rung.typical) throw new BadField(`${field}.low: expected at most typical (${rung.typical}), got ${rung.low}`)
  if (rung.high < rung.typical) throw new BadField(`${field}.high: expected at least typical (${rung.typical}), got ${rung.high}`)
  return rung
}

function readWindow(field: string, value: unknown): RecoatWindow {
  const ends = listAt(field, value)
  if (ends.length !== 2) throw new BadField(`${field}: expected two ends [from, to], got ${ends.length}`)
  const end = (i: number) => optional(ends[i], null, v => numberAt(`${field}[${i}]`, v, 0, longestMinutes))
  const [from, to] = [end(0), end(1)]
  if (from !== null && to !== null && to < from) throw new BadField(`${field}[1]: expected at least ${from}, got ${to}`)
  return [from, to]
}

function readInline(field: string, value: unknown): DryingMaterial {
  const fields = objectAt(field, value)
  const reference = objectAt(`${field}.reference`, fields.reference)
  const milestones = listAt(`${field}.milestones`, fields.milestones).map((m, i) => readMilestone(`${field}.milestones[${i}]`, m))
  if (milestones.length === 0) throw new BadField(`${field}.milestones: expected at least one`)
  for (const [i, { name }] of milestones.entries()) {
    if (milestones.findIndex(m => m.name === name) < i) throw new BadField(`${field}.milestones[${i}].name: expected each milestone once, got "${name}" again`)
  }
  return {
    reference: {
      tempC: numberAt(`${field}.reference.tempC`, reference.tempC, -20, 60),
      rh: numberAt(`${field}.reference.rh`, reference.rh, 0.05, 0.95),
    },
    minTempC: optional(fields.minTempC, null, v => numberAt(`${field}.minTempC`, v, -40, 60)),
    maxRh: optional(fields.maxRh, null, v => numberAt(`${field}.maxRh`, v, 0, 1)),
    dryAirFloor: optional(fields.dryAirFloor, null, v => numberAt(`${field}.dryAirFloor`, v, 0, 0.1)),
    milestones,
    windows: optional(fields.windows, [], v => listAt(`${field}.windows`, v).map((w, i) => readWindow(`${field}.windows[${i}]`, w))),
    thicknessExponent: optional(fields.thicknessExponent, undefined, v => numberAt(`${field}.thicknessExponent`, v, 0, 4)),
    mixed: optional(fields.mixed, false, v => yesNoAt(`${field}.mixed`, v)),
    blushes: optional(fields.blushes, false, v => yesNoAt(`${field}.blushes`, v)),
  }
}

function readMaterial(field: string, value: unknown): DryingMaterial {
  if (typeof value !== 'string') return readInline(field, value)
  const found = findLibraryMaterial(value)
  if (!found) throw new BadField(`${field}: expected a starter material's id or a material written out, got "${value}"`)
  return dryingMaterial(found)
}

function readReading(field: string, value: unknown): Reading {
  const fields = objectAt(field, value)
  return {
    at: instantAt(`${field}.at`, fields.at),
    tempC: optional(fields.tempC, null, v => numberAt(`${field}.tempC`, v, -40, 60)),
    rh: numberAt(`${field}.rh`, fields.rh, 0, 1),
  }
}

function readTest(field: string, value: unknown, names: readonly string[], appliedAt: number): TouchTest {
  const fields = objectAt(field, value)
  const test: TouchTest = {
    at: instantAt(`${field}.at`, fields.at),
    milestone: oneOfAt(`${field}.milestone`, fields.milestone, names),
    reached: yesNoAt(`${field}.reached`, fields.reached),
    byRole: optional(fields.byRole, 'maker' as const, v => oneOfAt(`${field}.byRole`, v, ['owner', 'maker', 'helper'] as const)),
  }
  if (test.at < appliedAt) throw new BadField(`${field}.at: expected no earlier than appliedAt`)
  return test
}

function readCoat(at: (name: string) => string, value: unknown, names: readonly string[]): CoatCase & { readings: Reading[], witness: boolean[] } {
  const fields = objectAt(at(''), value)
  const appliedAt = instantAt(at('appliedAt'), fields.appliedAt)
  const list = (name: string) => optional(fields[name], [], v => listAt(at(name), v))
  return {
    appliedAt,
    size: optional(fields.coat, 'normal', v => oneOfAt(at('coat'), v, coatSizes)),
    ground: optional(fields.ground, 'primed', v => oneOfAt(at('ground'), v, grounds)),
    airSpeed: optional(fields.airSpeed, 0.1, v => numberAt(at('airSpeed'), v, 0, 10)),
    tests: list('tests').map((t, i) => readTest(at(`tests[${i}]`), t, names, appliedAt)),
    witness: list('tests').map((t, i) => optional(objectAt(at(`tests[${i}]`), t).witness, false, v => yesNoAt(at(`tests[${i}].witness`), v))),
    readings: list('readings').map((r, i) => readReading(at(`readings[${i}]`), r)),
  }
}

function readZone(field: string, value: unknown): string {
  const zone = textAt(field, value)
  try {
    return new Intl.DateTimeFormat('en-US', { timeZone: zone }).resolvedOptions().timeZone && zone
  }
  catch {
    throw new BadField(`${field}: expected a zone such as Europe/Lisbon, got "${zone}"`)
  }
}

function readUsual(field: string, value: unknown): { tempC: number, rh: number } {
  const fields = objectAt(field, value)
  return { tempC: numberAt(`${field}.tempC`, fields.tempC, -40, 60), rh: numberAt(`${field}.rh`, fields.rh, 0, 1) }
}

/**
 * Reads one case of the contract. `place` names the case in a list ("[2]") or is empty. Throws BadField with one line for the first field
 * that cannot be used. Earlier coats (`history`) are read like the coat itself; they share its zone, heating and usual climate.
 */
export function readCase(value: unknown, place: string): ModelCase {
  const at = (name: string) => [place, name].filter(Boolean).join('.') || 'case'
  const fields = objectAt(at(''), value)
  const material = readMaterial(at('material'), fields.material)
  const names = material.milestones.map(m => m.name)
  const { readings, witness: _witness, ...coat } = readCoat(at, fields, names)
  const air = {
    heated: optional(fields.heated, false, v => yesNoAt(at('heated'), v)),
    nightDropC: optional(fields.nightDropC, 4, v => numberAt(at('nightDropC'), v, 0, 40)),
    zone: optional(fields.zone, 'UTC', v => readZone(at('zone'), v)),
    usual: optional(fields.usual, { tempC: 20, rh: 0.5 }, v => readUsual(at('usual'), v)),
  }
  const history = optional(fields.history, [], v => listAt(at('history'), v)).map((earlier, i): EarlierCoat => {
    const { readings: read, witness, ...before } = readCoat(name => [at(`history[${i}]`), name].filter(Boolean).join('.'), earlier, names)
    return { coat: before, room: { ...air, readings: read }, witness }
  })
  return {
    material,
    coat,
    room: { ...air, readings },
    history,
    theta: optional(fields.theta, null, v => numberAt(at('theta'), v, -5, 5)),
    now: optional(fields.now, coat.appliedAt, v => instantAt(at('now'), v)),
  }
}
