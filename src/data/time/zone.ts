import { Temporal } from "temporal-polyfill";
import { InputError } from "../../numeric/index.js";
import { suggestion } from "../nearest.js";

/** A stretch of time with one offset from UTC. All in milliseconds; the end is excluded. */
interface Stretch {
  readonly start: number;
  readonly end: number;
  readonly offset: number;
}

/** A clock of one time zone, fast enough for a column: its offset changes are looked up once. */
export interface ZoneClock {
  /** Wall time (milliseconds as if it were UTC) of an instant. */
  wallOf(instant: number): number;
  /** The instants that show a wall time: none when the clock skips it, two when it shows it twice. */
  instantsOf(wall: number): readonly number[];
}

const clocks = new Map<string, ZoneClock>();

/** The clock of an IANA zone. Throws InputError for a name that is no zone, suggesting the nearest. */
export function zoneClock(zone: string): ZoneClock {
  let clock = clocks.get(zone);
  if (!clock) {
    clock = makeClock(zone);
    clocks.set(zone, clock);
  }
  return clock;
}

function makeClock(zone: string): ZoneClock {
  requireZone(zone);
  let known: Stretch = stretchAt(zone, 0);
  const at = (instant: number): Stretch => {
    if (instant >= known.start && instant < known.end) return known;
    let low = 0;
    let high = stretches.length - 1;
    while (low <= high) {
      const middle = (low + high) >> 1;
      const stretch = stretches[middle]!;
      if (instant < stretch.start) high = middle - 1;
      else if (instant >= stretch.end) low = middle + 1;
      else {
        known = stretch;
        return stretch;
      }
    }
    known = stretchAt(zone, instant);
    stretches.splice(low, 0, known);
    return known;
  };
  const stretches: Stretch[] = [known];
  return {
    wallOf: (instant) => instant + at(instant).offset,
    instantsOf: (wall) => {
      const found: number[] = [];
      // No clock is more than a day from UTC, so the two stretches around the wall time hold every answer.
      for (const stretch of new Set([at(wall - dayMilliseconds), at(wall), at(wall + dayMilliseconds)])) {
        const instant = wall - stretch.offset;
        if (instant >= stretch.start && instant < stretch.end) found.push(instant);
      }
      return found.sort((a, b) => a - b);
    },
  };
}

const dayMilliseconds = 86_400_000;

function stretchAt(zone: string, instant: number): Stretch {
  const here = Temporal.Instant.fromEpochMilliseconds(Math.floor(instant)).toZonedDateTimeISO(zone);
  const next = here.getTimeZoneTransition("next");
  // "previous" leaves out a transition at this very instant, so it is asked from one nanosecond later.
  const before = here.add({ nanoseconds: 1 }).getTimeZoneTransition("previous");
  return {
    start: before ? before.epochMilliseconds : Number.NEGATIVE_INFINITY,
    end: next ? next.epochMilliseconds : Number.POSITIVE_INFINITY,
    offset: here.offsetNanoseconds / 1e6,
  };
}

function requireZone(zone: string): void {
  try {
    Temporal.Instant.fromEpochMilliseconds(0).toZonedDateTimeISO(zone);
  } catch {
    throw new InputError(
      `${JSON.stringify(zone)} is no time zone.${suggestion(zone, Intl.supportedValuesOf("timeZone"))}`,
    );
  }
}
