import type { Advice, CoatCase, CoatPrediction } from '#shared/drying/types'
import type { AirSpan, Climb } from '#shared/drying/ladder'

export function adviseCoat(_way: Climb, _coat: CoatCase, _spans: readonly AirSpan[], _prediction: CoatPrediction, _now: number): Advice[] {
  return []
}
