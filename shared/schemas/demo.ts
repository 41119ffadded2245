/** GET /api/demo: whether the invented studio is this person's to add or take away, and what of it is there. */
export interface DemoWire { may: boolean, there: { studioId: number, name: string, rooms: number, batches: number, pieces: number, people: number } | null }
