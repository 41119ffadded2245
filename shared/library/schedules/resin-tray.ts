import { benchWork, coat, done, glueUp, inWindow, lightSanding, look, part, recoatable, sandable, strainable } from '#shared/library/schedules/build'
import type { LibrarySchedule } from '#shared/library/types'

const bubbles = [look('Warm out the bubbles', 10, 3), look('Look for bubbles and dust, cover', 40, 2)]

export const resinTray: LibrarySchedule = {
  key: 'resin-tray',
  name: 'Resin tray with wooden handles',
  summary: 'A seal coat of resin and a flood coat while it is still tacky, lying level; the handles are shellacked meanwhile and glued on when the resin is hard.',
  parts: [
    part('tray', 'Tray', 'underside', { inside: 'Inside', rim: 'Rim' }),
    part('handles', 'Handles', 'tenons', { all: 'All round' }, 'tray'),
  ],
  steps: [
    benchWork('tape', 'Clean, level and tape off', [10, 12, 5], 'tray'),
    coat('seal', 'Seal coat of resin', 'epoxy-coating', [10, 6, 10], 'tray.inside', { coatSize: 'thin', ground: 'porous', placeKind: 'bench', checks: bubbles }),
    coat('flood', 'Flood coat while the seal is tacky', 'epoxy-coating', [10, 10, 10], 'tray.inside', { coatSize: 'flood', placeKind: 'bench', checks: bubbles }),
    benchWork('untape', 'Pull the tape and trim the drips', [5, 10, 5], 'tray'),
    lightSanding('rim-sand', 'Sand the rim wet', [5, 10, 5], 'tray.rim', { dust: 'none' }),
    coat('rim', 'Oil varnish on the rim', 'wiping-varnish', [5, 5, 5], 'tray.rim', { coatSize: 'thin', ground: 'porous', placeKind: 'shelf', checks: [look('Wipe off what is left on top', 15, 2)] }),
    lightSanding('shape-handles', 'Shape and sand the handles', [10, 20, 10], 'handles.all'),
    coat('shellac-handles', 'Shellac the handles', 'shellac', [5, 5, 5], 'handles.all', { perDay: 3, coatSize: 'thin', ground: 'porous', placeKind: 'hook' }),
    glueUp('handles-on', 'Glue on the handles', 'epoxy-slow', [10, 8, 5, 3], 'tray handles', { hold: 'clamps', placeKind: 'clamps', ground: 'sealed' }),
    benchWork('last-look', 'Take off the squeeze-out, feet on', [5, 10], 'tray handles'),
  ],
  links: [
    done('tape', 'seal'), inWindow('seal', 'flood', null), recoatable('flood', 'untape', 'dry-to-handle'), done('untape', 'rim-sand'), sandable('flood', 'rim-sand'), done('rim-sand', 'rim'),
    strainable('flood', 'handles-on', 'cured'), strainable('rim', 'handles-on', 'dry-to-sand-lightly'),
    done('shape-handles', 'shellac-handles'), strainable('shellac-handles', 'handles-on', 'dry-to-sand-flat'), strainable('handles-on', 'last-look', 'full-strength'),
  ],
}
