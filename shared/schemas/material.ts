/** A material on a big key: what a thumb puts on. `versionId` is its newest edition. */
export interface RecentMaterialWire { versionId: number, name: string, glue: boolean, solventBorne: boolean }

/** GET /api/materials/recent: at most six for the big keys, and all others by name. */
export interface RecentMaterialsWire { recent: RecentMaterialWire[], others: RecentMaterialWire[] }
