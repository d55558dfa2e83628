import type { ScenarioRun, ScenarioSpan, SimulatedSensor } from '@shared/contracts/simulation';
import { calmRoom, calmShelf, type RoomDisturbance, type ShelfDisturbance } from '../room/disturbance';
import { scenarios, type ScenarioEffect, type SensorEffect } from './catalogue';

interface TimedRun {
  readonly run: ScenarioRun;
  readonly fromMs: number;
  readonly toMs: number;
}

/** Which scenarios run when: those of the room's story, and those that somebody starts. */
export class ScenarioTimeline {
  private runs: readonly TimedRun[] = [];
  private started = 0;

  /** @param story - Scenarios of the past. */
  constructor(story: readonly ScenarioSpan[] = []) {
    for (const span of story) this.add(span);
  }

  /** Adds a scenario and names its run. Spans are half-open: at `to` it is over. */
  add(span: ScenarioSpan): ScenarioRun {
    this.started += 1;
    const run = { ...span, run: `${span.scenario}-${this.started}` };
    const timed = { run, fromMs: Date.parse(span.from), toMs: Date.parse(span.to) };
    this.runs = [...this.runs, timed];
    return run;
  }

  /**
   * Ends a run that has not ended.
   *
   * @param name - Its name.
   * @param at - Now, milliseconds since 1970 UTC.
   * @returns Whether there was such a run.
   */
  end(name: string, at: number): boolean {
    const isRunning = this.runningAt(at).some(({ run }) => run === name);
    this.runs = this.runs.map((timed) =>
      isRunning && timed.run.run === name
        ? { ...timed, run: { ...timed.run, to: new Date(at).toISOString() }, toMs: at }
        : timed,
    );
    return isRunning;
  }

  /** The runs in force at an instant. */
  runningAt(at: number): ScenarioRun[] {
    return this.inForce(at).map(({ run }) => run);
  }

  /** What is done to the room at an instant. */
  disturbanceAt(at: number): RoomDisturbance {
    const inForce = this.inForce(at);
    if (inForce.length === 0) return calmRoom;
    const shelves = new Map<string, ShelfDisturbance>();
    let { draughtGS } = calmRoom;
    for (const timed of inForce) {
      const effect = effectAt(timed, at);
      draughtGS += effect.roomDraughtGS ?? 0;
      const { shelf } = timed.run;
      shelves.set(shelf, { ...(shelves.get(shelf) ?? calmShelf), ...effect.shelf });
    }
    return { draughtGS, shelves };
  }

  /** What is done to a sensor at an instant; the last of several scenarios wins. */
  sensorEffectAt(sensor: SimulatedSensor, at: number): SensorEffect {
    const concerned = this.inForce(at).filter(
      ({ run }) => run.shelf === sensor.shelf && (run.quantity ?? sensor.quantity) === sensor.quantity,
    );
    return concerned.reduce<SensorEffect>(
      (effect, timed) => ({ ...effect, ...effectAt(timed, at).sensors }),
      {},
    );
  }

  private inForce(at: number): TimedRun[] {
    return this.runs.filter(({ fromMs, toMs }) => fromMs <= at && at < toMs);
  }
}

function effectAt({ run, fromMs, toMs }: TimedRun, at: number): ScenarioEffect {
  return scenarios[run.scenario].effect(run, (at - fromMs) / (toMs - fromMs));
}
