import type { LoggerFile, LoggerFileDetail } from '@shared/contracts/logger-files';
import type { StaffedRoom } from './room-callers';
import type { TestApplication } from './test-application';

/** When {@link fileOf} begins. */
export const fileStart = Date.UTC(2026, 3, 1);
/** Between its rows. */
export const fileStep = 300_000;

/** An invented file of a thermometer and hygrometer, five minutes apart. */
export function fileOf(
  rows: number,
  change: (row: number) => Partial<{ t: string; rh: string }> = () => ({}),
): string {
  const lines = Array.from({ length: rows }, (_, row) => {
    const { t = (21 + (row % 7) / 10).toFixed(1), rh = String(60 + (row % 5)) } = change(row);
    return `${new Date(fileStart + row * fileStep).toISOString()},${t},${rh}`;
  });
  return ['time,temperature (°C),humidity (%)', ...lines, ''].join('\n');
}

/** The way of a grower's files into a room, step by step. */
export interface FileRoad {
  uploaded(content: string | Buffer, name?: string): Promise<LoggerFileDetail>;
  /** Matches the file's series to these sensors, in their order. */
  matched(file: LoggerFileDetail, sensorIds: readonly string[]): Promise<LoggerFileDetail>;
  /** Begins a deed and waits for its end. */
  done(fileId: string, deed: string, body?: object): Promise<LoggerFile>;
}

/** @param staff - Of the room. */
export function fileRoad(application: TestApplication, staff: StaffedRoom): FileRoad {
  const path = `${staff.path}/logger-files`;
  return {
    uploaded: async (content, name = 'shelf.csv') => {
      const sent = staff.grower.call('post', path).attach('file', Buffer.from(content), name);
      return (await sent.expect(201)).body as LoggerFileDetail;
    },
    matched: async (file, sensorIds) => {
      const series = file.series.map(({ key }, index) => ({ key, sensorId: sensorIds[index] ?? null }));
      const reply = await staff.grower.put(`${path}/${file.id}/matches`, { series }).expect(200);
      return reply.body as LoggerFileDetail;
    },
    done: async (fileId, deed, body = {}) => {
      await staff.grower.post(`${path}/${fileId}/${deed}`, body).expect(202);
      await application.app.services.loggerFiles.settled();
      return (await staff.viewer.get(`${path}/${fileId}`).expect(200)).body as LoggerFile;
    },
  };
}
