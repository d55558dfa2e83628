/** What a caller is answered: a refusal's status, or that the request went through to the handler. */
export type Outcome = 401 | 403 | 404 | 'allowed';

/** Everybody that the table is about: nobody signed in, a device with its token, a keeper of another room, members. */
export const callers = ['nobody', 'device', 'outsider', 'viewer', 'helper', 'grower', 'keeper'] as const;
/** One of {@link callers}. */
export type CallerName = (typeof callers)[number];

type Outcomes = Readonly<Record<CallerName, Outcome>>;

/** One endpoint: what each caller is answered, and a good request where the endpoint's parameters alone make none. */
export interface AccessRow {
  readonly outcomes: Outcomes;
  readonly body?: object;
  readonly query?: string;
}

const anyone: Outcomes = {
  nobody: 'allowed',
  device: 'allowed',
  outsider: 'allowed',
  viewer: 'allowed',
  helper: 'allowed',
  grower: 'allowed',
  keeper: 'allowed',
};
const signedIn: Outcomes = { ...anyone, nobody: 401, device: 401 };
const device: Outcomes = {
  nobody: 401,
  device: 'allowed',
  outsider: 401,
  viewer: 401,
  helper: 401,
  grower: 401,
  keeper: 401,
};
const viewer: Outcomes = {
  nobody: 401,
  device: 401,
  outsider: 404,
  viewer: 'allowed',
  helper: 'allowed',
  grower: 'allowed',
  keeper: 'allowed',
};
const helper: Outcomes = {
  nobody: 401,
  device: 401,
  outsider: 404,
  viewer: 403,
  helper: 'allowed',
  grower: 'allowed',
  keeper: 'allowed',
};
const grower: Outcomes = {
  nobody: 401,
  device: 401,
  outsider: 404,
  viewer: 403,
  helper: 403,
  grower: 'allowed',
  keeper: 'allowed',
};
const keeper: Outcomes = {
  nobody: 401,
  device: 401,
  outsider: 404,
  viewer: 403,
  helper: 403,
  grower: 403,
  keeper: 'allowed',
};

const span = 'from=2026-04-01T00:00:00Z&to=2026-04-02T00:00:00Z';
const days = 'from=2026-04-01&to=2026-04-08';
const routine = {
  kind: 'water',
  title: 'Water',
  place: { at: 'room' },
  timing: { how: 'calendar', rule: 'FREQ=DAILY', startsOn: '2026-04-15' },
  who: { how: 'onDuty' },
};
const noLimits = { low: null, high: null };

/**
 * Who may what, endpoint by endpoint: written out by hand from the roles that people know, so that it agrees with the
 * contract only if both are right.
 */
export const accessTable: Readonly<Record<string, AccessRow>> = {
  isAlive: { outcomes: anyone },
  isReady: { outcomes: anyone },

  signIn: { outcomes: anyone },
  signOut: { outcomes: signedIn },
  getAccount: { outcomes: signedIn },
  changeAccount: { outcomes: signedIn },
  changePassword: { outcomes: signedIn },
  changeMailChoice: { outcomes: viewer },
  listMembers: { outcomes: viewer },
  listAuditEntries: { outcomes: keeper },

  getMailLink: { outcomes: anyone },
  followMailLink: { outcomes: anyone },
  getEscalation: { outcomes: viewer },
  setEscalation: { outcomes: keeper, body: { goNowMinutes: 60, lookTodayMinutes: null } },

  getRoom: { outcomes: viewer },
  changeRoom: { outcomes: keeper },
  listRacks: { outcomes: viewer },
  addRack: { outcomes: keeper },
  addShelf: { outcomes: keeper, body: { label: 'new' } },
  changeShelf: { outcomes: keeper, body: { widthCm: 90 } },
  retireShelf: { outcomes: keeper },
  fitLamp: { outcomes: keeper, body: { kind: 'whiteLed', watts: 40, fittedOn: '2026-01-01' } },
  setLampHours: { outcomes: grower, body: { switchesOn: '06:00', switchesOff: '22:00' } },
  setHeatMat: { outcomes: grower, body: { watts: 40, isOn: true } },
  listWantedRanges: { outcomes: viewer },
  setWantedRange: {
    outcomes: grower,
    body: { lampsOn: noLimits, lampsOff: noLimits, holdMinutes: 15, clearingMargin: 0.5 },
  },
  tryWantedRange: {
    outcomes: grower,
    body: { lampsOn: noLimits, lampsOff: noLimits, holdMinutes: 15, clearingMargin: 0.5 },
  },
  clearWantedRange: { outcomes: grower },
  listRoomRanges: { outcomes: viewer },
  setRoomRange: {
    outcomes: grower,
    body: { lampsOn: noLimits, lampsOff: noLimits, holdMinutes: 15, clearingMargin: 0.5 },
  },
  clearRoomRange: { outcomes: grower },
  setWantedLight: { outcomes: grower, body: { leastMolM2D: 8 } },
  clearWantedLight: { outcomes: grower },

  postReadings: { outcomes: device },
  getDeviceState: { outcomes: device },
  listDevices: { outcomes: viewer },
  addDevice: { outcomes: keeper },
  renewDeviceToken: { outcomes: keeper },
  revokeDevice: { outcomes: keeper },
  addSensor: {
    outcomes: keeper,
    body: { key: 'new', quantity: 'airTemperature', expectedIntervalS: 60 },
  },
  placeSensor: { outcomes: keeper, body: { from: '2026-04-01T00:00:00Z' } },
  placeSensorEarlier: { outcomes: grower, body: { since: '2026-01-01T00:00:00Z' } },

  getBoard: { outcomes: viewer },
  getShelf: { outcomes: viewer },
  getSeries: { outcomes: viewer, query: span },
  getShelfReport: { outcomes: viewer, query: span },
  getDegreeDays: { outcomes: viewer, query: span },

  uploadLoggerFile: { outcomes: grower },
  importLoggerFile: { outcomes: grower },
  listLoggerFiles: { outcomes: viewer },
  getLoggerFile: { outcomes: viewer },
  matchLoggerFile: { outcomes: grower },
  checkLoggerFile: { outcomes: grower },
  bringInLoggerFile: { outcomes: grower },
  cancelLoggerFile: { outcomes: grower },
  takeOutLoggerFile: { outcomes: grower },
  downloadLoggerFile: { outcomes: viewer },
  listRejections: { outcomes: viewer },
  downloadRejections: { outcomes: viewer },
  removeLoggerFile: { outcomes: grower },
  listFileProfiles: { outcomes: viewer },
  renameFileProfile: { outcomes: grower, body: { name: 'another name' } },
  removeFileProfile: { outcomes: grower },

  listAlerts: { outcomes: viewer },
  getAlert: { outcomes: viewer },
  countAlerts: { outcomes: viewer },
  getAlertTimeLine: { outcomes: viewer },
  acknowledgeAlert: { outcomes: helper },
  takeBackAcknowledgement: { outcomes: helper },
  quietAlert: { outcomes: helper, body: { until: '2026-04-15T12:00:00Z' } },
  endQuiet: { outcomes: helper },
  noteAlertDeed: { outcomes: helper, body: { text: 'vent opened' } },
  removeAlertDeed: { outcomes: helper },
  assignAlert: { outcomes: helper, body: { personId: null } },

  listTasks: { outcomes: viewer, query: days },
  getCareDays: { outcomes: viewer },
  completeTask: { outcomes: helper },
  reopenTask: { outcomes: helper },
  addTask: { outcomes: helper },
  removeTask: { outcomes: helper },
  moveTask: { outcomes: grower, body: { dueOn: '2026-04-20' } },
  assignTask: { outcomes: grower, body: { personIds: [] } },
  takeOverTask: { outcomes: helper },
  addTaskPhoto: { outcomes: helper },
  listRoutines: { outcomes: viewer },
  addRoutine: { outcomes: grower },
  changeRoutine: { outcomes: grower, body: routine },
  endRoutine: { outcomes: grower },
  listReadyMadeRoutines: { outcomes: viewer, query: 'cropId=leek' },
  adoptRoutines: {
    outcomes: grower,
    body: { readyMadeIds: ['look-for-pests'], who: { how: 'onDuty' } },
  },
  getRota: { outcomes: viewer, query: days },
  setDutyWeek: { outcomes: keeper, body: { week: [] } },
  setDutyDay: { outcomes: keeper },
  clearDutyDay: { outcomes: keeper },
  addAbsence: { outcomes: helper, body: { from: '2026-04-20', to: '2026-04-21' } },
  removeAbsence: { outcomes: helper },
  getFairShare: { outcomes: viewer, query: days },
  listSwaps: { outcomes: viewer },
  offerSwap: { outcomes: helper },
  takeSwap: { outcomes: helper },
  withdrawSwap: { outcomes: helper },
  listCareRecord: { outcomes: viewer },
  downloadCareRecord: { outcomes: grower },
  getCareYields: { outcomes: viewer, query: days },
  getCareCompliance: { outcomes: viewer, query: days },
  getPlantingDrying: { outcomes: viewer },
  getCalendarFeed: { outcomes: signedIn },
  renewCalendarFeed: { outcomes: signedIn },
  removeCalendarFeed: { outcomes: signedIn },
  readCalendarFeed: { outcomes: anyone },
  addShelfEvent: { outcomes: helper, body: { kind: 'observed', text: 'up' } },

  listCrops: { outcomes: viewer },
  getCrop: { outcomes: viewer },
  copyCrop: { outcomes: grower, body: { copyOf: 'leek', name: 'Another leek' } },
  changeCrop: {
    outcomes: grower,
    body: {
      name: 'Changed leek',
      botanicalName: '',
      group: 'alliums',
      habit: 'blades',
      eaten: null,
      toxicToPets: null,
      seed: null,
      sowing: { weeksToTransplant: [], plantingOutWeeks: null, sowBeforeFrostWeeks: [] },
      climate: {},
      degreeDays: null,
      dayLength: null,
      usualPot: null,
    },
  },
  retireCrop: { outcomes: grower },
  listVarieties: { outcomes: viewer },
  addVariety: { outcomes: grower, body: { cropId: 'leek', name: 'Another' } },
  changeVariety: { outcomes: grower, body: { note: 'early' } },
  removeVariety: { outcomes: grower },

  listSeedLots: { outcomes: viewer },
  addSeedLot: { outcomes: grower, body: { cropId: 'leek', unit: 'seeds', amount: 50 } },
  getSeedLot: { outcomes: viewer },
  changeSeedLot: { outcomes: grower, body: { note: 'dry' } },
  recountSeedLot: { outcomes: grower, body: { left: 12 } },
  removeSeedLot: { outcomes: grower },
  getSeedsNeeded: { outcomes: viewer, query: 'plants=5' },
  addGerminationTest: { outcomes: grower, body: { startedOn: '2026-04-10', seeds: 10 } },
  countGerminationTest: { outcomes: helper, body: { on: '2026-04-10', up: 3 } },
  removeGerminationTest: { outcomes: grower },

  listPlantings: { outcomes: viewer },
  getPlanting: { outcomes: viewer },
  startPlanting: {
    outcomes: grower,
    body: { how: 'sown', cropId: 'leek', count: 20, shelfId: null },
  },
  changePlanting: { outcomes: grower, body: { source: 'a neighbour' } },
  removePlanting: { outcomes: grower },
  splitPlanting: { outcomes: grower, body: { count: 5 } },
  mergePlanting: { outcomes: grower, body: { otherId: '0b6f6c0e-0000-4000-8000-000000000001' } },
  observePlanting: { outcomes: helper, body: { kind: 'noted', note: 'curled leaves' } },
  stepPlanting: { outcomes: grower, body: { kind: 'pottedOn', container: '1 L' } },
  undoPlantingEvent: { outcomes: helper },

  getFrostDates: { outcomes: viewer },
  setFrostDates: { outcomes: grower, body: { lastSpring: null, firstAutumn: null } },
  getDayLength: { outcomes: viewer },
  getSowingCalendar: { outcomes: viewer },
  chooseSowingCrop: { outcomes: grower },
  unchooseSowingCrop: { outcomes: grower },
  addSowingTask: { outcomes: grower, body: { on: '2026-05-01' } },
  getShelfAdvice: { outcomes: viewer },
  getPlantingProgress: { outcomes: viewer },
  getGermination: { outcomes: viewer },
  addPlantingPhoto: { outcomes: helper },
  addSeedLotPhoto: { outcomes: grower },
  getPhotoImage: { outcomes: viewer },
  removePhoto: { outcomes: helper },

  listScenarios: { outcomes: keeper },
  startScenario: { outcomes: keeper },
  stopScenario: { outcomes: keeper },
};
