import type passport from 'passport';
import type { Logger } from 'pino';
import { AlertAnswerService } from './alerts/alert-answer-service';
import { AlertAnswerStore } from './alerts/alert-answer-store';
import { AlertHistoryStore } from './alerts/alert-history-store';
import type { AdviceService } from './advice/advice-service';
import { AlertService } from './alerts/alert-service';
import { alertRoutes } from './alerts/alert-routes';
import { AlertStore } from './alerts/alert-store';
import { RangeTrialService } from './alerts/range-trial-service';
import type { SecondLookJob } from './alerts/second-look-job';
import { secondLookJob } from './alerts/second-look-parts';
import { AuditLogService } from './audit/audit-log-service';
import { auditRoutes } from './audit/audit-routes';
import { AuditStore } from './audit/audit-store';
import { RoomChanges } from './audit/room-changes';
import { BoardPublisher } from './board/board-publisher';
import { boardRoutes } from './board/board-routes';
import { BoardService } from './board/board-service';
import { BoardStore } from './board/board-store';
import { ShelfNowService } from './board/shelf-now-service';
import { careGround, careServices } from './care-services';
import type { CareReminderJob } from './care/care-reminder-job';
import type { ShelfEventsService } from './care/shelf-events-service';
import type { TaskPlanningService } from './care/task-planning-service';
import type { Clock } from './clock';
import type { Config } from './config';
import type { Transactions } from './database/transactions';
import { ScenariosService } from './demonstration/scenarios-service';
import { scenariosRoutes } from './demonstration/scenarios-routes';
import { DeviceIntakeService } from './devices/device-intake-service';
import { deviceIntakeRoutes } from './devices/device-intake-routes';
import { DeviceIntakeStore } from './devices/device-intake-store';
import { devicesRoutes } from './devices/devices-routes';
import { DevicesService } from './devices/devices-service';
import { DevicesStore } from './devices/devices-store';
import { growingServices } from './growing-services';
import type { AccessLookup } from './http/access';
import type { Route } from './http/route';
import type { LiveRelay } from './live/live-relay';
import { loggerFileParts } from './logger-files/logger-file-parts';
import { loggerFileRoutes } from './logger-files/logger-file-routes';
import type { LoggerFileRunner } from './logger-files/logger-file-runner';
import { MailAlertTeller } from './mail/alert-teller';
import { CareTeller } from './mail/care-teller';
import { EscalationJob } from './mail/escalation-job';
import { EscalationService } from './mail/escalation-service';
import { MailComposer } from './mail/mail-composer';
import { MailFooters } from './mail/mail-footers';
import { MailLinkTokens } from './mail/mail-link-tokens';
import { MailLinksService } from './mail/mail-links-service';
import { mailRoutes } from './mail/mail-routes';
import { MailStore } from './mail/mail-store';
import { MorningLetterJob } from './mail/morning-letter-job';
import { TellingStore } from './mail/telling-store';
import { peopleRoutes } from './people/people-routes';
import { PeopleService } from './people/people-service';
import { PeopleStore } from './people/people-store';
import { SignIn } from './people/sign-in';
import { SignInAttempts } from './people/sign-in-attempts';
import { GerminationStore } from './plantings/germination-store';
import { HistoryUpkeepService } from './readings/history-upkeep-service';
import { intakeParts } from './readings/intake-parts';
import { roomsRoutes } from './rooms/rooms-routes';
import { RoomRangesService } from './rooms/room-ranges-service';
import { RoomsService } from './rooms/rooms-service';
import { RoomsStore } from './rooms/rooms-store';
import { ShelfPlansService } from './rooms/shelf-plans-service';
import { ShelfPlansStore } from './rooms/shelf-plans-store';
import { ShelfRulesService } from './rooms/shelf-rules-service';
import { LightStore } from './series/light-store';
import { seriesRoutes } from './series/series-routes';
import { SeriesService } from './series/series-service';
import { SeriesStore } from './series/series-store';
import { ShelfPageService } from './series/shelf-page-service';
import { ShelfReportService } from './series/shelf-report-service';

/** What the services stand on. */
export interface Foundation {
  readonly transactions: Transactions;
  readonly passport: passport.Authenticator;
  readonly relay: LiveRelay;
  readonly config: Config;
  readonly log: Logger;
  readonly now: Clock;
  /** Where links in mails lead, without a trailing slash. */
  readonly publicUrl: () => string;
  /** Seals the links in mails. */
  readonly secret: string;
}

/** Everything that the process and the tests hold on to. */
export interface Services {
  readonly routes: readonly Route[];
  readonly accessLookup: AccessLookup;
  readonly peopleStore: PeopleStore;
  readonly mailStore: MailStore;
  readonly mailComposer: MailComposer;
  readonly escalationJob: EscalationJob;
  readonly morningLetterJob: MorningLetterJob;
  readonly deviceIntake: DeviceIntakeService;
  readonly boardPublisher: BoardPublisher;
  readonly secondLookJob: SecondLookJob;
  readonly planning: TaskPlanningService;
  readonly shelfEvents: ShelfEventsService;
  readonly careReminderJob: CareReminderJob;
  readonly advice: AdviceService;
  readonly loggerFiles: LoggerFileRunner;
  /** Tells the scenarios which room is the demonstration. */
  setDemonstrationRoom(roomId: string | null): void;
}

/**
 * Makes every area's service and joins them: the one place that knows all areas.
 *
 * @param foundation - What they stand on.
 * @returns The services and their routes.
 */
export function composeServices(foundation: Foundation): Services {
  const { transactions, relay, config, log, now } = foundation;
  const audit = new AuditStore();
  const changes = new RoomChanges(transactions, audit, relay);

  const peopleStore = new PeopleStore();
  const attempts = new SignInAttempts(transactions);
  const people = new PeopleService(transactions, peopleStore, attempts, audit);

  const plansStore = new ShelfPlansStore();
  const plans = new ShelfPlansService(plansStore);
  const germination = new GerminationStore();

  const alertStore = new AlertStore();
  const mailStore = new MailStore();
  const tellings = new TellingStore();
  const mailDomain = domainOf(config.mailFrom);
  const teller = new MailAlertTeller({ alerts: alertStore, tellings, mailDomain });
  const road = intakeParts(transactions, plans, teller);
  const hooks = new HistoryUpkeepService({ ...road, alerts: alertStore, now });

  const roomsStore = new RoomsStore();
  const rooms = new RoomsService({ transactions, rooms: roomsStore, changes, hooks, now });
  const ground = careGround(rooms, now);
  const roomRanges = new RoomRangesService(transactions, changes);
  const growing = growingServices({
    transactions,
    changes,
    rooms,
    roomRanges,
    plans,
    plansStore,
    hooks,
    openTasks: ground.openTasks,
    people,
    feed: relay,
    log,
    now,
  });
  const { plantings } = growing;
  const rules = new ShelfRulesService({
    transactions,
    rooms: roomsStore,
    plans: plansStore,
    reader: plans,
    changes,
    hooks,
    now,
  });
  const devices = new DevicesService({
    transactions,
    devices: new DevicesStore(),
    rooms,
    changes,
    hooks,
    now,
  });
  const { publicUrl } = foundation;
  const tokens = new MailLinkTokens(foundation.secret);
  const footers = new MailFooters(tokens);
  const care = careServices({
    ground,
    growing,
    transactions,
    changes,
    rooms,
    people,
    teller: new CareTeller({ tellings, mails: mailStore, footers, publicUrl, mailDomain, now }),
    feed: relay,
    publicUrl,
    mailDomain,
    now,
  });
  const alerts = new AlertService({
    transactions,
    alerts: alertStore,
    history: new AlertHistoryStore(),
    feed: relay,
  });
  const answering = new AlertAnswerService({
    transactions,
    answers: new AlertAnswerStore(),
    alerts,
    people,
    teller,
    audit,
    now,
  });

  const loggerFiles = loggerFileParts({
    transactions,
    road,
    audit,
    feed: relay,
    publishAlerts: (alertIds) => alerts.publishChanged(alertIds),
    now,
    onError: (error) => log.error({ err: error }, 'work on a logger file failed'),
  });

  const lightStore = new LightStore();
  const boardStore = new BoardStore();
  const boards = new BoardService(
    transactions,
    boardStore,
    new ShelfNowService(boardStore, lightStore, plans),
    {
      roomOf: (tx, roomId) => rooms.roomOf(tx, roomId),
      plantingsOn: (tx, shelfIds) => plantings.plantingsOn(tx, shelfIds),
      sowingsOn: (tx, shelfIds) => growing.germination.sowingsOn(tx, shelfIds),
      adviceFor: (tx, shelfIds) => growing.advice.adviceFor(tx, shelfIds),
      openAlerts: (roomId) => alerts.open(roomId),
      tasksOf: (roomId, from, to) => care.tasks.list(roomId, { from, to }),
    },
    now,
  );
  const boardPublisher = new BoardPublisher(boards, alerts, relay, log);
  const deviceIntake = new DeviceIntakeService(
    transactions,
    new DeviceIntakeStore(),
    road.intake,
    boardPublisher,
    now,
    (error) => log.warn({ err: error }, 'batch not stored; the device keeps it'),
  );

  const seriesStore = new SeriesStore();
  const series = new SeriesService(transactions, seriesStore, road.readings, road.computed, plans);
  const pages = new ShelfPageService(transactions, seriesStore, {
    racksOf: (roomId) => rooms.racksOf(roomId),
    plantingsOn: (tx, shelfIds) => plantings.plantingsOn(tx, shelfIds),
    wantedRangesOf: (tx, shelfIds) => plans.wantedRangesOf(tx, shelfIds),
    wantedLightOf: (...of) => plans.wantedLightOf(...of),
  });
  const reports = new ShelfReportService(transactions, seriesStore, series, lightStore, {
    plannedLamps: (...of) => plans.plannedLamps(...of),
    wantedRangesOf: (...of) => plans.wantedRangesOf(...of),
    eventsOf: (...of) => care.shelfEvents.of(...of),
    luxPerUmolOf: (tx, shelfId) => seriesStore.luxPerUmolOf(tx, shelfId),
  });

  const rangeTrials = new RangeTrialService(
    transactions,
    {
      requireShelf: (roomId, shelfId) => pages.requireShelf(roomId, shelfId),
      sensorsOn: (...of) => seriesStore.sensorsOn(...of),
      samples: (...of) => series.flaggedSamples(...of),
      plannedLamps: (...of) => plans.plannedLamps(...of),
    },
    now,
  );

  const mailComposer = new MailComposer({
    alerts: alertStore,
    tellings,
    mails: mailStore,
    footers,
    publicUrl,
    seriesOf: (...of) => series.series(...of),
  });
  const morningLetterJob = new MorningLetterJob({
    transactions,
    tellings,
    mails: mailStore,
    footers,
    publicUrl,
    mailDomain,
    now,
    racksOf: (roomId) => rooms.racksOf(roomId),
    reportOf: (...of) => reports.report(...of),
    openAlertsOf: (roomId) => alerts.open(roomId),
    newestAlertsOf: (roomId) => alerts.newest(roomId),
    tasksOf: (roomId, from, to) => care.tasks.list(roomId, { from, to }),
  });

  let demonstrationRoom: string | null = null;
  const scenarios = new ScenariosService(config.simulatorControl, () => demonstrationRoom, now);

  return {
    routes: [
      ...peopleRoutes(people, new SignIn(foundation.passport, config.isHttps), attempts),
      ...mailRoutes(
        new MailLinksService(transactions, tellings, people, tokens),
        new EscalationService(transactions, tellings, changes),
      ),
      ...auditRoutes(new AuditLogService(transactions, audit)),
      ...roomsRoutes(rooms, rules, roomRanges),
      ...devicesRoutes(devices),
      ...deviceIntakeRoutes(deviceIntake),
      ...boardRoutes(boards),
      ...seriesRoutes(pages, series, reports),
      ...alertRoutes(alerts, answering, rangeTrials),
      ...loggerFileRoutes(loggerFiles.files, config.uploadMaxBytes),
      ...care.routes,
      ...growing.routes,
      ...scenariosRoutes(scenarios),
    ],
    accessLookup: {
      membershipOf: (personId, roomId) => people.membershipOf(personId, roomId),
      deviceOf: (token) => devices.deviceOf(token),
    },
    peopleStore,
    mailStore,
    mailComposer,
    escalationJob: new EscalationJob(transactions, tellings, teller, now),
    morningLetterJob,
    deviceIntake,
    boardPublisher,
    secondLookJob: secondLookJob({
      transactions,
      readings: road.readings,
      teller,
      plannedLamps: (...of) => plans.plannedLamps(...of),
      germinatingOn: (...of) => germination.germinatingOn(...of),
      wantedLightOf: (...of) => plans.wantedLightOf(...of),
      alerts,
      now,
    }),
    planning: care.planning,
    shelfEvents: care.shelfEvents,
    careReminderJob: care.reminderJob,
    advice: growing.advice,
    loggerFiles: loggerFiles.runner,
    setDemonstrationRoom: (roomId) => {
      demonstrationRoom = roomId;
    },
  };
}

function domainOf(mailFrom: string): string {
  return /@([^>\s]+)/.exec(mailFrom)?.[1] ?? 'localhost';
}
