import * as answers from '@shared/contracts/alert-answers';
import { countAlerts, getAlert, getAlertTimeLine, listAlerts } from '@shared/contracts/alerts';
import { tryWantedRange } from '@shared/contracts/rooms';
import { route, type Route, type RouteContext } from '../http/route';
import type { AlertAnswer, AlertAnswerService } from './alert-answer-service';
import type { AlertService } from './alert-service';
import type { RangeTrialService } from './range-trial-service';

/**
 * Alerts over HTTP.
 *
 * @param alerts - Lists, counts and tells them.
 * @param answering - Takes what people do about them.
 * @param trials - Tries wanted ranges before they are set.
 * @returns The routes.
 */
export function alertRoutes(
  alerts: AlertService,
  answering: AlertAnswerService,
  trials: RangeTrialService,
): Route[] {
  return [
    route(listAlerts, ({ room, query }) => alerts.list(room, query)),
    route(countAlerts, ({ room, query }) => alerts.counts(room, query)),
    route(getAlert, ({ room, params }) => alerts.one(room.id, params.alertId)),
    route(getAlertTimeLine, ({ room, params }) => alerts.timeLine(room.id, params.alertId)),
    route(answers.acknowledgeAlert, (context) => answering.acknowledge(answerOf(context), context.body.note)),
    route(answers.takeBackAcknowledgement, (context) => answering.takeBackAcknowledgement(answerOf(context))),
    route(answers.quietAlert, (context) => answering.quiet(answerOf(context), new Date(context.body.until))),
    route(answers.endQuiet, (context) => answering.endQuiet(answerOf(context))),
    route(answers.noteAlertDeed, (context) => answering.noteDeed(answerOf(context), context.body.text)),
    route(answers.removeAlertDeed, (context) =>
      answering.removeDeed(answerOf(context), context.params.deedId),
    ),
    route(tryWantedRange, ({ room, params, body }) =>
      trials.try(room.id, params.shelfId, { ...body, quantity: params.quantity }),
    ),
    route(answers.assignAlert, (context) => answering.assign(answerOf(context), context.body.personId)),
  ];
}

function answerOf({
  room,
  person,
  params,
}: Pick<RouteContext<{ alertId: string }, unknown, unknown>, 'room' | 'person' | 'params'>): AlertAnswer {
  return { room, person, alertId: params.alertId };
}
