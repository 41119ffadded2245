import { airCourses } from '~~/server/services/air-course'
import { defineStudioHandler } from '~~/server/utils/handler'
import { courseQuery } from '#shared/schemas/air-query'
import { toWire } from '#shared/schemas/wire'

/** GET /api/air/course?span=week: how the air of every room went. */
export default defineStudioHandler({
  may: 'read the studio',
  query: courseQuery,
  run: ({ db, studio, query, now }) => toWire(airCourses(db, studio.id, query.span, now)),
})
