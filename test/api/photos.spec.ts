import { randomBytes } from 'node:crypto';
import sharp, { type Sharp } from 'sharp';
import { PHOTO_MAX_BYTES, type Photo } from '@shared/contracts/photos';
import type { PlantingDetail } from '@shared/contracts/plantings';
import type { SeedLotDetail } from '@shared/contracts/seed';
import { PhotoEntity } from '../../server/photos/photo-entity';
import { aPhoto } from '../builders/photos';
import { aSeedLot } from '../builders/seed';
import type { Caller } from './caller';
import { PlantingRoom, problemOf } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

describe('photos', () => {
  let application: TestApplication;
  let room: PlantingRoom;
  let planting: PlantingDetail;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    room = await PlantingRoom.in(application);
    planting = await room.sown();
  });
  afterAll(() => application.stop());

  const picture = (width: number, height: number): Sharp =>
    sharp({ create: { width, height, channels: 3, background: '#3a7d44' } });
  const send = (bytes: Buffer, name = 'photo.jpg', by: Caller = room.staff.helper, id = planting.id) =>
    by
      .call('post', `${room.staff.path}/plantings/${id}/photos?caption=first%20leaves`)
      .attach('file', bytes, name);
  const added = async (bytes: Buffer): Promise<Photo> => (await send(bytes).expect(201)).body as Photo;
  const image = (id: string, size = 'full') =>
    room.staff.viewer.get(`${room.staff.path}/photos/${id}/image?size=${size}`);
  const kept = (): Promise<number> => application.tx.countBy(PhotoEntity, { roomId: room.staff.room.id });

  it('are made smaller, and a thumbnail smaller still, as JPEGs that no browser takes for anything else', async () => {
    const photo = await added(await picture(3200, 2400).png().toBuffer());

    expect(photo).toMatchObject({
      width: 1600,
      height: 1200,
      caption: 'first leaves',
      at: '2026-04-15T10:00:00.000Z',
      personId: room.staff.people.helper.id,
      personName: room.staff.people.helper.name,
    });
    const full = await image(photo.id).expect(200);
    expect(full.headers['content-type']).toBe('image/jpeg');
    expect(full.headers['x-content-type-options']).toBe('nosniff');
    expect(full.headers['cache-control']).toContain('private');
    expect(await sharp(full.body as Buffer).metadata()).toMatchObject({
      format: 'jpeg',
      width: 1600,
      height: 1200,
    });
    const small = await image(photo.id, 'thumbnail').expect(200);
    expect(await sharp(small.body as Buffer).metadata()).toMatchObject({ width: 320, height: 240 });
    expect((await room.detail(planting.id)).photos).toEqual([photo]);
  });

  it('lose where and with what they were taken, and stand upright', async () => {
    const exif = { IFD0: { Make: 'Invented', Software: 'secret' }, IFD3: { GPSLatitude: '53/1 20/1 0/1' } };
    const lying = await picture(400, 200).withExif(exif).withMetadata({ orientation: 6 }).jpeg().toBuffer();
    expect((await sharp(lying).metadata()).exif).toBeDefined();

    const photo = await added(lying);

    const { exif: left, width, height } = await sharp((await image(photo.id)).body as Buffer).metadata();
    expect(left).toBeUndefined();
    expect([width, height]).toEqual([200, 400]);
  });

  it('smaller than the limit are not blown up', async () => {
    expect(await added(await picture(40, 30).webp().toBuffer())).toMatchObject({ width: 40, height: 30 });
  });

  it.each([
    ['an HTML file named .jpg', () => Buffer.from('<!doctype html><script>alert(1)</script>')],
    ['a drawing', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>')],
    ['a picture that was cut off', async () => (await picture(600, 600).jpeg().toBuffer()).subarray(0, 900)],
    ['nothing at all', () => Buffer.alloc(0)],
  ])('refuse %s, and keep nothing', async (_, bytes) => {
    const refused = await send(await bytes()).expect(415);

    expect(problemOf(refused).code).toBe('NOT_A_PHOTO');
    expect(await kept()).toBe(0);
  });

  it('refuse a file of 40 MB, and keep nothing', async () => {
    const refused = await send(randomBytes(2 * PHOTO_MAX_BYTES)).expect(413);

    expect(problemOf(refused).code).toBe('FILE_TOO_LARGE');
    expect(await kept()).toBe(0);
  });

  it('refuse a picture whose few bytes unfold into too many pixels', async () => {
    const bomb = await picture(12_000, 12_000).png({ compressionLevel: 9 }).toBuffer();

    expect(problemOf(await send(bomb).expect(422)).code).toBe('PHOTO_TOO_LARGE');
  });

  it('of a packet are shown with its lot, the newest first', async () => {
    const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id });
    const bytes = await picture(60, 40).jpeg().toBuffer();
    const path = `${room.staff.path}/seed-lots/${lot.id}/photos`;
    await room.staff.grower.call('post', path).attach('file', bytes, 'front.jpg').expect(201);
    application.now = new Date('2026-04-15T11:00:00Z');
    const back = await room.staff.grower.call('post', path).attach('file', bytes, 'back.jpg').expect(201);

    const detail = await room.read<SeedLotDetail>(`/seed-lots/${lot.id}`);
    expect(detail.photo).toEqual(back.body);
    expect(detail.photos).toHaveLength(2);
  });

  it('are removed by growers, and by helpers where they are their own', async () => {
    const own = await added(await picture(60, 40).jpeg().toBuffer());
    const foreign = await aPhoto(application.tx, { plantingId: planting.id });
    const remove = (id: string, by: Caller) => by.delete(`${room.staff.path}/photos/${id}`);

    expect(problemOf(await remove(foreign.id, room.staff.helper).expect(403)).code).toBe('NOT_YOURS');
    await remove(own.id, room.staff.helper).expect(204);
    await remove(foreign.id, room.staff.grower).expect(204);

    expect(await kept()).toBe(0);
    await image(own.id).expect(404);
  });
});
