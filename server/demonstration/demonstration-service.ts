import { chmod, mkdir, writeFile } from 'node:fs/promises';
import { dirname } from 'node:path';
import { patienceDefaults, usualUrgency } from '@shared/alerts/alert-defaults';
import { simulatedRoom, type SimulatedRoom } from '@shared/contracts/simulation';
import { kestrelLane } from '@shared/demonstration/kestrel-lane';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { deviceTokenHash, newDeviceToken } from '../devices/device-tokens';
import { hashPassword } from '../people/passwords';
import {
  demonstrationEvents,
  demonstrationPassword,
  demonstrationPeople,
  demonstrationRacks,
  demonstrationLight,
  demonstrationRanges,
  LONG_AGO_DAYS,
} from './demonstration-content';
import { DemonstrationCare } from './demonstration-care';
import { DemonstrationGrowing } from './demonstration-growing';
import type { DemonstrationStore } from './demonstration-store';

const DAY_MS = 86_400_000;
/** Light sensors see light above this [µmol m⁻² s⁻¹]. */
const LIT_ABOVE_UMOL = 5;
const roomName = 'Kestrel Lane growing room';

/** Fills an empty database with the invented room, once, and tells the simulator which room to play. */
export class DemonstrationService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: DemonstrationStore,
    private readonly planTasks: (tx: Tx, roomId: string) => Promise<void>,
    private readonly now: Clock,
  ) {}

  /**
   * Fills the demonstration unless anybody is there already.
   *
   * @param devicesFile - Where the simulator reads its room and its tokens; written with rights for the owner only.
   * @returns The id of the demonstration room, null when the database holds somebody else's room.
   */
  async fill(devicesFile: string): Promise<string | null> {
    const held = await this.store.roomNamed(this.transactions.plain, roomName);
    if (held !== null) return held;
    if (await this.store.hasPeople(this.transactions.plain)) return null;
    const passwordHash = await hashPassword(demonstrationPassword);
    const room = await this.transactions.run((tx) => this.create(tx, passwordHash));
    await mkdir(dirname(devicesFile), { recursive: true });
    await writeFile(devicesFile, JSON.stringify(room, null, 2), { mode: 0o600 });
    await chmod(devicesFile, 0o600); // An older file keeps its own rights when written over.
    return room.roomId;
  }

  private async create(tx: Tx, passwordHash: string): Promise<SimulatedRoom> {
    const now = this.now().getTime();
    const plan = kestrelLane(now);
    const roomId = await this.store.addRoom(tx, {
      name: roomName,
      timeZone: plan.timeZone,
      latitudeDeg: plan.latitudeDeg,
      longitudeDeg: plan.longitudeDeg,
    });
    const people = new Map<string, string>();
    for (const person of demonstrationPeople) {
      people.set(person.email, await this.store.addMember(tx, roomId, { ...person, passwordHash }));
    }
    const shelves = await this.addShelves(tx, roomId, plan);
    await this.addRanges(tx, now, plan.timeZone, shelves);
    const devices = await this.addDevices(tx, roomId, plan, shelves);
    const personId = people.get('maren@example.org') ?? null;
    const zone = plan.timeZone;
    await new DemonstrationGrowing().fill(tx, { roomId, zone, now, shelves, personId });
    await this.addMarks(tx, zone, now, shelves);
    const care = new DemonstrationCare();
    await care.fill(tx, { roomId, zone, now, shelves, people }, this.planTasks);
    return simulatedRoom.parse({ ...plan, roomId, devices });
  }

  private async addShelves(tx: Tx, roomId: string, plan: Plan): Promise<Map<string, string>> {
    const shelves = new Map<string, string>();
    for (const [rackPosition, rack] of demonstrationRacks.entries()) {
      const rackId = await this.store.addRack(tx, {
        roomId,
        name: rack.name,
        note: rack.note,
        position: rackPosition,
      });
      for (const [position, label] of rack.shelves.entries()) {
        const shelfId = await this.store.addShelf(tx, {
          roomId,
          rackId,
          label,
          position,
          widthCm: 120,
          depthCm: 45,
        });
        shelves.set(label, shelfId);
        const shelf = plan.shelves.find((candidate) => candidate.label === label);
        if (shelf !== undefined) await this.fitOut(tx, shelfId, shelf);
      }
    }
    return shelves;
  }

  private async fitOut(tx: Tx, shelfId: string, shelf: Plan['shelves'][number]): Promise<void> {
    await this.store.addLamp(tx, {
      shelfId,
      kind: shelf.lamp.kind,
      watts: shelf.lamp.watts,
      luxPerUmol: shelf.lamp.luxPerUmol,
      fittedOn: shelf.lamp.fittedAt.slice(0, 10),
    });
    for (const { from, lampPlan } of shelf.arrangements) {
      const hours = lampPlan[0];
      await this.store.addLampPlan(tx, {
        shelfId,
        validFrom: new Date(from),
        switchesOn: hours?.on ?? null,
        switchesOff: hours?.off ?? null,
      });
    }
    if (shelf.heatMatWatts === null) return;
    const isOn = shelf.arrangements.at(-1)?.isHeatMatOn ?? false;
    await this.store.addHeatMat(tx, { shelfId, watts: shelf.heatMatWatts, isOn });
  }

  private async addRanges(
    tx: Tx,
    now: number,
    zone: string,
    shelves: ReadonlyMap<string, string>,
  ): Promise<void> {
    for (const { shelf, quantity, lampsOn, lampsOff, reason, sinceDaysAgo } of demonstrationRanges) {
      await this.store.addWantedRange(tx, {
        shelfId: idOf(shelves, shelf),
        quantity,
        lampsOnLow: lampsOn.low,
        lampsOnHigh: lampsOn.high,
        lampsOffLow: lampsOff.low,
        lampsOffHigh: lampsOff.high,
        holdMinutes: patienceDefaults[quantity].holdMs / 60_000,
        clearingMargin: patienceDefaults[quantity].clearMargin,
        urgentBy: usualUrgency(quantity).by,
        urgentAfterMinutes: usualUrgency(quantity).afterMinutes,
        reason,
        // From the noon after, when covers, lamps and mats had done their part.
        since: new Date(dayBounds(dayBefore(now, sinceDaysAgo - 1, zone), zone).start + DAY_MS / 2),
      });
    }
    for (const { shelf, leastMolM2D, reason } of demonstrationLight) {
      const since = new Date(dayBounds(dayBefore(now, LONG_AGO_DAYS, zone), zone).start);
      const shelfId = idOf(shelves, shelf);
      await this.store.addWantedLight(tx, { shelfId, leastMolM2D, source: 'shelf', reason, since });
    }
  }

  private async addDevices(
    tx: Tx,
    roomId: string,
    plan: Plan,
    shelves: ReadonlyMap<string, string>,
  ): Promise<SimulatedRoom['devices']> {
    const devices: SimulatedRoom['devices'] = [];
    for (const { name, sensors } of plan.devices) {
      const token = newDeviceToken();
      const deviceId = await this.store.addDevice(tx, { roomId, name, tokenHash: deviceTokenHash(token) });
      for (const sensor of sensors) {
        const luxPerUmol = plan.shelves.find(({ label }) => label === sensor.shelf)?.lamp.luxPerUmol ?? 1;
        await this.store.addPlacedSensor(
          tx,
          {
            roomId,
            deviceId,
            key: sensor.key,
            quantity: sensor.quantity,
            expectedIntervalS: sensor.expectedIntervalSeconds,
            lightThreshold: lightThreshold(sensor.quantity, luxPerUmol),
          },
          {
            shelfId: idOf(shelves, sensor.shelf),
            fromAt: new Date(plan.shelves[0]?.arrangements[0]?.from ?? 0),
          },
        );
      }
      devices.push({ id: deviceId, name, token, sensors });
    }
    return devices;
  }

  private async addMarks(
    tx: Tx,
    zone: string,
    now: number,
    shelves: ReadonlyMap<string, string>,
  ): Promise<void> {
    for (const { shelf, daysAgo, at, kind, text } of demonstrationEvents) {
      const { start } = dayBounds(dayBefore(now, daysAgo, zone), zone);
      const [hours = 0, minutes = 0] = at.split(':').map(Number);
      const instant = Math.min(now, start + (hours * 60 + minutes) * 60_000);
      await this.store.addShelfEvent(tx, {
        shelfId: idOf(shelves, shelf),
        at: new Date(instant),
        kind,
        text,
      });
    }
  }
}

type Plan = ReturnType<typeof kestrelLane>;

function idOf(shelves: ReadonlyMap<string, string>, label: string): string {
  const shelfId = shelves.get(label);
  if (shelfId === undefined) throw new Error(`The demonstration has no shelf ${label}`);
  return shelfId;
}

function dayBefore(now: number, days: number, zone: string): string {
  return dayBounds(now - days * DAY_MS, zone).date;
}

function lightThreshold(quantity: string, luxPerUmol: number): number | null {
  if (quantity === 'ppfd') return LIT_ABOVE_UMOL;
  return quantity === 'illuminance' ? LIT_ABOVE_UMOL * luxPerUmol : null;
}
