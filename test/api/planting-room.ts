import type { Planting, PlantingDetail } from '@shared/contracts/plantings';
import type { PlantingNow } from '@shared/contracts/planting-events';
import type { Problem } from '@shared/contracts/problem';
import type { Test } from 'supertest';
import type { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aShelf } from '../builders/rooms';
import type { Caller } from './caller';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import type { TestApplication } from './test-application';

/** A staffed room with shelf A3, and short ways to sow on it and to tell what happens. */
export class PlantingRoom {
  private constructor(
    readonly staff: StaffedRoom,
    readonly shelf: ShelfEntity,
  ) {}

  /** Makes one. */
  static async in(application: TestApplication): Promise<PlantingRoom> {
    const staff = await aStaffedRoom(application);
    return new PlantingRoom(staff, await aShelf(application.tx, { roomId: staff.room.id, label: 'A3' }));
  }

  /** Twenty leeks sown on A3 on 1 April 2026, as a request says it. */
  sowing(more: object = {}): object {
    return {
      how: 'sown',
      cropId: 'leek',
      count: 20,
      shelfId: this.shelf.id,
      at: '2026-04-01T09:00:00Z',
      ...more,
    };
  }

  /** A grower starts a planting. */
  start(body: object): Test {
    return this.staff.grower.post(`${this.staff.path}/plantings`, body);
  }

  /** {@link sowing}, done. */
  async sown(more: object = {}): Promise<PlantingDetail> {
    return (await this.start(this.sowing(more)).expect(201)).body as PlantingDetail;
  }

  /** A grower does something with a planting. */
  step(id: string, body: object): Test {
    return this.staff.grower.post(`${this.staff.path}/plantings/${id}/steps`, body);
  }

  /** A helper notes something of a planting. */
  observe(id: string, body: object): Test {
    return this.staff.helper.post(`${this.staff.path}/plantings/${id}/observations`, body);
  }

  /** A helper counts what is up. */
  counted(id: string, up: number, at = '2026-04-10T08:00:00Z', more: object = {}): Test {
    return this.observe(id, { kind: 'counted', up, at, ...more });
  }

  /** Somebody undoes an event. */
  undo(id: string, eventId: string | null, by: Caller = this.staff.grower): Test {
    return by.delete(`${this.staff.path}/plantings/${id}/events/${eventId ?? ''}`);
  }

  /** What a path of the room answers a viewer. */
  async read<T>(path: string): Promise<T> {
    return (await this.staff.viewer.get(`${this.staff.path}${path}`).expect(200)).body as T;
  }

  /** A planting with its story. */
  detail(id: string): Promise<PlantingDetail> {
    return this.read(`/plantings/${id}`);
  }

  /** A page of plantings. */
  async listed(query = ''): Promise<Planting[]> {
    return (await this.read<{ plantings: Planting[] }>(`/plantings${query}`)).plantings;
  }
}

/** The problem of an answer. */
export function problemOf(reply: { body: unknown }): Problem {
  return reply.body as Problem;
}

/** The fields that a problem names. */
export function fieldsOf(reply: { body: unknown }): string[] | undefined {
  return problemOf(reply).errors?.map(({ path }) => path);
}

/** The id of the event that was noted. */
export function eventOf(reply: { body: unknown }): string {
  return (reply.body as PlantingNow).event.id;
}
