import { CreatePeopleAndRooms1764550800000 } from './1764550800000-create-people-and-rooms';
import { CreateRacksAndShelves1764550900000 } from './1764550900000-create-racks-and-shelves';
import { CreateDevices1764551000000 } from './1764551000000-create-devices';
import { CreateReadings1764551100000 } from './1764551100000-create-readings';
import { CreateAlertsAndMail1764551200000 } from './1764551200000-create-alerts-and-mail';
import { CreatePlantingsAndCare1764551300000 } from './1764551300000-create-plantings-and-care';
import { CreateLoggerFiles1764551400000 } from './1764551400000-create-logger-files';
import { CreateAuditEntry1764551500000 } from './1764551500000-create-audit-entry';
import { CreateRequestCounters1764551600000 } from './1764551600000-create-request-counters';
import { CreateSocketAttachments1764551700000 } from './1764551700000-create-socket-attachments';
import { TellPeopleByChoice1764551800000 } from './1764551800000-tell-people-by-choice';
import { AnswerAlerts1764552100000 } from './1764552100000-answer-alerts';
import { TellOffShelfReadings1764552300000 } from './1764552300000-tell-off-shelf-readings';
import { CreateCrops1764552400000 } from './1764552400000-create-crops';
import { CreateSeed1764552500000 } from './1764552500000-create-seed';
import { WaitForSecondLook1764552550000 } from './1764552550000-wait-for-second-look';
import { KeepPlantingHistory1764552600000 } from './1764552600000-keep-planting-history';
import { CreatePhoto1764552700000 } from './1764552700000-create-photo';
import { SetUrgencyOfRanges1764553300000 } from './1764553300000-set-urgency-of-ranges';
import { CreateShelfAdvice1764553400000 } from './1764553400000-create-shelf-advice';
import { CreateSowingCalendar1764553500000 } from './1764553500000-create-sowing-calendar';
import { TellAssignees1764553400000 } from './1764553400000-tell-assignees';
import { CreateWantedLight1764554500000 } from './1764554500000-create-wanted-light';
import { CreateCareRota1764554600000 } from './1764554600000-create-care-rota';
import { TellCareOutside1764554700000 } from './1764554700000-tell-care-outside';
import { NoteWhereChangesComeFrom1764556000000 } from './1764556000000-note-where-changes-come-from';
import { RemoveTasksWithPlanting1764556100000 } from './1764556100000-remove-tasks-with-planting';
import { CreateRoomRange1764556200000 } from './1764556200000-create-room-range';

/** Every migration in order; a merged one is never edited. */
export const migrations = [
  CreatePeopleAndRooms1764550800000,
  CreateRacksAndShelves1764550900000,
  CreateDevices1764551000000,
  CreateReadings1764551100000,
  CreateAlertsAndMail1764551200000,
  CreatePlantingsAndCare1764551300000,
  CreateLoggerFiles1764551400000,
  CreateAuditEntry1764551500000,
  CreateRequestCounters1764551600000,
  CreateSocketAttachments1764551700000,
  TellPeopleByChoice1764551800000,
  AnswerAlerts1764552100000,
  TellOffShelfReadings1764552300000,
  CreateCrops1764552400000,
  CreateSeed1764552500000,
  WaitForSecondLook1764552550000,
  KeepPlantingHistory1764552600000,
  CreatePhoto1764552700000,
  SetUrgencyOfRanges1764553300000,
  CreateShelfAdvice1764553400000,
  CreateSowingCalendar1764553500000,
  TellAssignees1764553400000,
  CreateWantedLight1764554500000,
  CreateCareRota1764554600000,
  TellCareOutside1764554700000,
  NoteWhereChangesComeFrom1764556000000,
  RemoveTasksWithPlanting1764556100000,
  CreateRoomRange1764556200000,
];
