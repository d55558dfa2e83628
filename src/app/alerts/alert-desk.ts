import { inject, Injectable } from '@angular/core';
import type { AlertDeed, Alert } from '@shared/contracts/alerts';
import {
  acknowledgeAlert,
  assignAlert,
  endQuiet,
  noteAlertDeed,
  quietAlert,
  removeAlertDeed,
  takeBackAcknowledgement,
} from '@shared/contracts/alert-answers';
import { tap, type Observable } from 'rxjs';
import { AlertInbox } from '../core/alert-inbox';
import { ApiClient } from '../core/api-client';
import { Session } from '../core/session';

/** Sends what people do about alerts; the inbox follows at once, and everybody else by the live connection. */
@Injectable({ providedIn: 'root' })
export class AlertDesk {
  private readonly api = inject(ApiClient);
  private readonly inbox = inject(AlertInbox);
  private readonly session = inject(Session);

  /** Says that the person has seen it. */
  acknowledge(alert: Alert, note: string): Observable<Alert> {
    return this.held(this.api.call(acknowledgeAlert, { params: this.params(alert), body: { note } }));
  }

  /** Takes that back. */
  takeBack(alert: Alert): Observable<Alert> {
    return this.held(this.api.call(takeBackAcknowledgement, { params: this.params(alert) }));
  }

  /** Lets nobody be written to about its kind on its shelf until an instant [ms since 1970 UTC]. */
  quiet(alert: Alert, until: number): Observable<Alert> {
    const body = { until: new Date(until).toISOString() };
    return this.held(this.api.call(quietAlert, { params: this.params(alert), body }));
  }

  /** Lets people be written to again. */
  endQuiet(alert: Alert): Observable<Alert> {
    return this.held(this.api.call(endQuiet, { params: this.params(alert) }));
  }

  /**
   * Notes what was done.
   *
   * @param idempotencyKey - The same for every try of the same note.
   */
  noteDeed(alert: Alert, text: string, idempotencyKey: string): Observable<Alert> {
    const params = this.params(alert);
    return this.held(this.api.call(noteAlertDeed, { params, body: { text }, idempotencyKey }));
  }

  /** Takes a note of what was done away. */
  removeDeed(alert: Alert, { id }: Pick<AlertDeed, 'id'>): Observable<Alert> {
    const params = { ...this.params(alert), deedId: id };
    return this.held(this.api.call(removeAlertDeed, { params }));
  }

  /** Says who looks after it; null for nobody. */
  assign(alert: Alert, personId: string | null): Observable<Alert> {
    return this.held(this.api.call(assignAlert, { params: this.params(alert), body: { personId } }));
  }

  private params({ id }: Alert): { readonly roomId: string; readonly alertId: string } {
    return { roomId: this.session.roomId() ?? '', alertId: id };
  }

  private held(call: Observable<Alert>): Observable<Alert> {
    return call.pipe(tap((alert) => this.inbox.takeOver(alert)));
  }
}
