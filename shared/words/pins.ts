import { clockTime, roughTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { titled } from '#shared/words/steps'

/** Why a time cannot be given to a piece of work. Each names what clashes. */
export const pinWords = {
  past: (nextAt: number, clock: Clock) => `That time has gone by. The next that can be given is ${clockTime(nextAt, clock)}.`,
  begun: 'It has been begun: work in hand stays where it is.',
  notPlanned: 'It has no time in the plan, so there is nothing to pin.',
  notAble: (name: string, step: string) => `${name} does not do ${titled(step)}: choose somebody who may.`,
  hours: (name: string | null, step: string) => name === null ? `Nobody who may do ${titled(step)} is at work then for as long as it takes.` : `${name} is not at work then for as long as it takes.`,
  filmFirst: (step: string, readyAt: number, clock: Clock) => `${titled(step)} cannot begin before ${roughTime(readyAt, clock, 'up')}: what is beneath is not dry enough sooner.`,
  stepFirst: (step: string, before: string, readyAt: number, clock: Clock) => `${titled(step)} cannot begin before ${roughTime(readyAt, clock, 'up')}: ${titled(before)} comes first.`,
  shutRoom: (room: string) => `${room} stands shut until a person opens it, so nobody is planned into it.`,
  windowShut: (step: string, shutsAt: number, clock: Clock) => shutsAt < clock.now ? `The window for ${titled(step)} shut ${clockTime(shutsAt, clock)}. It wants its recovery first.` : `The window for ${titled(step)} shuts ${clockTime(shutsAt, clock)}. Later it wants its recovery.`,
  windowBetween: (step: string, opensAt: number, clock: Clock) => `The window for ${titled(step)} is shut then and opens again ${clockTime(opensAt, clock)}.`,
  taken: (name: string, other: string) => `${name} has ${titled(other)} then, which stays where it is.`,
  followed: (step: string, other: string) => `${titled(step)} would be too late for ${titled(other)}, which is pinned after it.`,
  apart: (step: string, other: string) => `${titled(step)} and ${titled(other)} do not go together in one room, and the other stays where it is.`,
  noPlanWithIt: 'With that, the rest finds no plan.',
} as const
