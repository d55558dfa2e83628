import 'reflect-metadata';
import { DataSource } from 'typeorm';
import { AlertAssignmentEntity } from '../alerts/alert-assignment-entity';
import { AdviceTaskEntity } from '../advice/advice-task-entity';
import { ShelfAdviceEntity } from '../advice/shelf-advice-entity';
import { AlertDeedEntity } from '../alerts/alert-deed-entity';
import { AlertEntity } from '../alerts/alert-entity';
import { AlertQuietEntity } from '../alerts/alert-quiet-entity';
import { AlertWatchEntity } from '../alerts/alert-watch-entity';
import { AuditEntryEntity } from '../audit/audit-entry-entity';
import { CalendarFeedEntity } from '../calendar/calendar-feed-entity';
import { RoutineEntity } from '../care/routine-entity';
import { RoutinePersonEntity } from '../care/routine-person-entity';
import { ShelfEventEntity } from '../care/shelf-event-entity';
import { TaskEntity } from '../care/task-entity';
import { TaskHolderEntity } from '../care/task-holder-entity';
import { RoomCropEntity } from '../crops/room-crop-entity';
import { VarietyEntity } from '../crops/variety-entity';
import { DeviceEntity } from '../devices/device-entity';
import { PlacementEntity } from '../devices/placement-entity';
import { SensorEntity } from '../devices/sensor-entity';
import { LoggerFileEntity } from '../logger-files/logger-file-entity';
import { LoggerFilePartEntity } from '../logger-files/logger-file-part-entity';
import { LoggerFileProfileEntity } from '../logger-files/logger-file-profile-entity';
import { LoggerFileRejectionEntity } from '../logger-files/logger-file-rejection-entity';
import { LoggerFileReplacedEntity } from '../logger-files/logger-file-replaced-entity';
import { MailEntity } from '../mail/mail-entity';
import { MorningLetterEntity } from '../mail/morning-letter-entity';
import { RoomEscalationEntity } from '../mail/room-escalation-entity';
import { ToldAlertEntity } from '../mail/told-alert-entity';
import { MembershipEntity } from '../people/membership-entity';
import { PersonEntity } from '../people/person-entity';
import { PhotoEntity } from '../photos/photo-entity';
import { PlantingEntity } from '../plantings/planting-entity';
import { PlantingEventEntity } from '../plantings/planting-event-entity';
import { PlantingPlaceEntity } from '../plantings/planting-place-entity';
import { DailySummaryEntity } from '../readings/daily-summary-entity';
import { HourlySummaryEntity } from '../readings/hourly-summary-entity';
import { ReadingEntity } from '../readings/reading-entity';
import { SensorStateEntity } from '../readings/sensor-state-entity';
import { ComputedHourlySummaryEntity } from '../readings/computed-hourly-summary-entity';
import { HeatMatEntity } from '../rooms/heat-mat-entity';
import { LampEntity } from '../rooms/lamp-entity';
import { LampPlanEntity } from '../rooms/lamp-plan-entity';
import { RackEntity } from '../rooms/rack-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { WantedLightEntity } from '../rooms/wanted-light-entity';
import { RoomRangeEntity } from '../rooms/room-range-entity';
import { WantedRangeEntity } from '../rooms/wanted-range-entity';
import { AbsenceEntity } from '../rota/absence-entity';
import { DutyDayEntity } from '../rota/duty-day-entity';
import { DutyDayPersonEntity } from '../rota/duty-day-person-entity';
import { DutyWeekdayEntity } from '../rota/duty-weekday-entity';
import { DutyWeekdayPersonEntity } from '../rota/duty-weekday-person-entity';
import { TaskSwapEntity } from '../rota/task-swap-entity';
import { GerminationCountEntity } from '../seed/germination-count-entity';
import { GerminationTestEntity } from '../seed/germination-test-entity';
import { SeedLotEntity } from '../seed/seed-lot-entity';
import { SeedUseEntity } from '../seed/seed-use-entity';
import { RoomFrostEntity } from '../sowing/room-frost-entity';
import { SowingChoiceEntity } from '../sowing/sowing-choice-entity';
import { migrations } from './migrations/all-migrations';

/** Every table that TypeORM maps. */
const entities = [
  AbsenceEntity,
  AdviceTaskEntity,
  AlertAssignmentEntity,
  AlertDeedEntity,
  AlertEntity,
  AlertQuietEntity,
  AlertWatchEntity,
  AuditEntryEntity,
  CalendarFeedEntity,
  DailySummaryEntity,
  DeviceEntity,
  DutyDayEntity,
  DutyDayPersonEntity,
  DutyWeekdayEntity,
  DutyWeekdayPersonEntity,
  GerminationCountEntity,
  GerminationTestEntity,
  HeatMatEntity,
  HourlySummaryEntity,
  LampEntity,
  LampPlanEntity,
  LoggerFileEntity,
  LoggerFilePartEntity,
  LoggerFileProfileEntity,
  LoggerFileRejectionEntity,
  LoggerFileReplacedEntity,
  MailEntity,
  MembershipEntity,
  MorningLetterEntity,
  PersonEntity,
  PhotoEntity,
  PlacementEntity,
  PlantingEntity,
  PlantingEventEntity,
  PlantingPlaceEntity,
  RackEntity,
  ReadingEntity,
  RoomCropEntity,
  RoomEntity,
  RoomEscalationEntity,
  RoomFrostEntity,
  RoutineEntity,
  RoutinePersonEntity,
  SeedLotEntity,
  SeedUseEntity,
  SensorEntity,
  SensorStateEntity,
  ShelfAdviceEntity,
  ShelfEntity,
  ShelfEventEntity,
  ComputedHourlySummaryEntity,
  SowingChoiceEntity,
  TaskEntity,
  TaskHolderEntity,
  TaskSwapEntity,
  ToldAlertEntity,
  VarietyEntity,
  WantedLightEntity,
  WantedRangeEntity,
  RoomRangeEntity,
];

/**
 * The data source over every entity and migration; `synchronize` is off everywhere.
 *
 * @param url - A `postgresql://` address.
 * @param poolSize - The most connections this process opens.
 * @returns A data source, not yet connected.
 */
export function createDataSource(url: string, poolSize = 12): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    synchronize: false,
    migrationsTableName: 'migration',
    uuidExtension: 'pgcrypto', // gen_random_uuid() is built in; nothing is installed.
    installExtensions: false,
    poolSize,
    // A server that went away must be noticed within seconds, so that devices keep what they hold.
    connectTimeoutMS: 5_000,
    extra: {
      application_name: 'lampmeadow',
      statement_timeout: 120_000,
      idleTimeoutMillis: 30_000,
      options: '-c jit=off', // Statements are short; compiling one takes longer than it would run.
    },
  });
}
