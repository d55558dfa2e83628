import type { Endpoint } from './endpoint';
import * as alerts from './alerts';
import * as board from './board';
import * as care from './care';
import * as devices from './devices';
import * as loggerFileProfiles from './logger-file-profiles';
import * as loggerFiles from './logger-files';
import * as mail from './mail';
import * as people from './people';
import * as rooms from './rooms';
import * as scenarios from './scenarios';
import * as series from './series';

/** Every route of `/api/v1`: the table that authorisation, OpenAPI and the tests walk. */
export const endpoints: readonly Endpoint[] = [
  people.signIn,
  people.signOut,
  people.getAccount,
  people.changeAccount,
  people.changePassword,
  people.changeMailChoice,
  people.listMembers,
  mail.getMailLink,
  mail.followMailLink,
  mail.getEscalation,
  mail.setEscalation,
  rooms.getRoom,
  rooms.changeRoom,
  rooms.listRacks,
  rooms.addRack,
  rooms.addShelf,
  rooms.changeShelf,
  rooms.retireShelf,
  rooms.fitLamp,
  rooms.setLampHours,
  rooms.setHeatMat,
  rooms.listWantedRanges,
  rooms.setWantedRange,
  rooms.clearWantedRange,
  devices.postReadings,
  devices.getDeviceState,
  devices.listDevices,
  devices.addDevice,
  devices.renewDeviceToken,
  devices.revokeDevice,
  devices.addSensor,
  devices.placeSensor,
  board.getBoard,
  series.getShelf,
  series.getSeries,
  series.getShelfReport,
  series.getDegreeDays,
  loggerFiles.uploadLoggerFile,
  loggerFiles.listLoggerFiles,
  loggerFiles.getLoggerFile,
  loggerFiles.matchLoggerFile,
  loggerFiles.checkLoggerFile,
  loggerFiles.bringInLoggerFile,
  loggerFiles.cancelLoggerFile,
  loggerFiles.listRejections,
  loggerFiles.downloadRejections,
  loggerFiles.takeOutLoggerFile,
  loggerFiles.importLoggerFile,
  loggerFiles.downloadLoggerFile,
  loggerFiles.removeLoggerFile,
  loggerFileProfiles.listFileProfiles,
  loggerFileProfiles.renameFileProfile,
  loggerFileProfiles.removeFileProfile,
  alerts.listAlerts,
  alerts.getAlert,
  alerts.acknowledgeAlert,
  care.listTasks,
  care.completeTask,
  care.reopenTask,
  care.listRoutines,
  care.addRoutine,
  care.addShelfEvent,
  scenarios.listScenarios,
  scenarios.startScenario,
  scenarios.stopScenario,
] as unknown as readonly Endpoint[];
