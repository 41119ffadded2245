import type { BenchWire } from '#shared/schemas/bench'

const isEnded = (error: unknown) => typeof error === 'object' && error !== null && 'statusCode' in error && error.statusCode === 401

/** The tablet that this page runs on, as the studio knows it; null while it is not signed in. */
export function useBenchTablet() {
  const tablet = useState<BenchWire | null>('bench tablet', () => null)
  const failed = useState('bench tablet failed', () => false)
  const request = useRequestFetch() as <Answer>(path: string, options?: object) => Promise<Answer>

  async function load() {
    try {
      tablet.value = await request<BenchWire>('/api/bench')
      failed.value = false
    }
    catch (error) {
      if (isEnded(error)) tablet.value = null
      else failed.value = true
    }
  }
  return { tablet, failed, load }
}
