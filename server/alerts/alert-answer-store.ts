import type { AlertKind } from '@shared/alerts/alert-rule';
import type { Quantity } from '@shared/climate/quantity';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { AlertAssignmentEntity } from './alert-assignment-entity';
import { AlertDeedEntity } from './alert-deed-entity';
import { AlertEntity } from './alert-entity';
import { AlertQuietEntity } from './alert-quiet-entity';

/** What a quiet is about: one kind of alert on a shelf. */
export interface AlertSubject {
  readonly shelfId: string;
  readonly quantity: Quantity;
  readonly kind: AlertKind;
}

/** An alert, as far as answering it needs it. */
export interface AnsweredAlert extends AlertSubject {
  readonly id: string;
  readonly acknowledgedAt: Date | null;
  readonly acknowledgedBy: string | null;
}

/** Who does something when. */
export interface Doing {
  readonly by: string;
  readonly at: Date;
}

/** Queries over what people do about alerts. */
export class AlertAnswerStore {
  /** Holds an alert against other answers; 404 when the room has no such alert. */
  async hold(tx: Tx, roomId: string, alertId: string): Promise<AnsweredAlert> {
    const rows: AnsweredAlert[] = await tx.query(
      `SELECT id, shelf_id AS "shelfId", quantity, kind, acknowledged_at AS "acknowledgedAt",
              acknowledged_by AS "acknowledgedBy"
       FROM alert WHERE id = $1 AND room_id = $2 FOR NO KEY UPDATE`,
      [alertId, roomId],
    );
    const [alert] = rows;
    if (alert === undefined) throw notFound('alert');
    return alert;
  }

  /** Notes who has seen an alert. */
  async acknowledge(tx: Tx, alertId: string, { by, at }: Doing, note: string): Promise<void> {
    await tx.update(
      AlertEntity,
      { id: alertId },
      { acknowledgedAt: at, acknowledgedBy: by, acknowledgeNote: note },
    );
  }

  /** Forgets who has seen an alert. */
  async takeBackAcknowledgement(tx: Tx, alertId: string): Promise<void> {
    await tx.update(
      AlertEntity,
      { id: alertId },
      { acknowledgedAt: null, acknowledgedBy: null, acknowledgeNote: '' },
    );
  }

  /** Lets nobody be written to about a subject until an instant. */
  async setQuiet(tx: Tx, subject: AlertSubject, { by, at }: Doing, until: Date): Promise<void> {
    const { shelfId, quantity, kind } = subject;
    await tx.insert(AlertQuietEntity, { shelfId, quantity, kind, setBy: by, setAt: at, until });
  }

  /** Ends the quiet that runs; false when none does. */
  async endQuiet(tx: Tx, { shelfId, quantity, kind }: AlertSubject, { by, at }: Doing): Promise<boolean> {
    const [, ended]: [unknown[], number] = await tx.query(
      `UPDATE alert_quiet SET ended_by = $4, ended_at = $5
       WHERE shelf_id = $1 AND quantity = $2 AND kind = $3 AND ended_at IS NULL AND until > $5`,
      [shelfId, quantity, kind, by, at],
    );
    return ended > 0;
  }

  /** Open alerts about a subject: several where several sensors watch it. */
  async openAbout(tx: Tx, { shelfId, quantity, kind }: AlertSubject): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      'SELECT id FROM alert WHERE shelf_id = $1 AND quantity = $2 AND kind = $3 AND cleared_at IS NULL',
      [shelfId, quantity, kind],
    );
    return rows.map(({ id }) => id);
  }

  /** Notes what was done. */
  async addDeed(tx: Tx, alertId: string, { by, at }: Doing, text: string): Promise<void> {
    await tx.insert(AlertDeedEntity, { alertId, personId: by, at, text });
  }

  /** Something that was done about an alert; 404 when there is no such note of it. */
  async deed(tx: Tx, alertId: string, deedId: string): Promise<AlertDeedEntity> {
    const deed = await tx.findOneBy(AlertDeedEntity, { id: deedId, alertId });
    if (deed === null) throw notFound('note');
    return deed;
  }

  /** Takes a note of what was done away. */
  async removeDeed(tx: Tx, deedId: string): Promise<void> {
    await tx.delete(AlertDeedEntity, { id: deedId });
  }

  /** Who looks after an alert; null for nobody. */
  async assigneeOf(tx: Tx, alertId: string): Promise<string | null> {
    const newest = await tx.findOne(AlertAssignmentEntity, { where: { alertId }, order: { at: 'DESC' } });
    return newest?.personId ?? null;
  }

  /** Says who looks after an alert; what is said at one instant counts once. */
  async assign(tx: Tx, alertId: string, { by, at }: Doing, personId: string | null): Promise<void> {
    await tx.upsert(AlertAssignmentEntity, { alertId, at, personId, assignedBy: by }, ['alertId', 'at']);
  }
}
