import { DeviceQueue } from './device-queue';

function gate(): { open: () => void; passed: Promise<void> } {
  let open = (): void => undefined;
  const passed = new Promise<void>((resolve) => {
    open = resolve;
  });
  return { open, passed };
}

describe('batches of devices', () => {
  it('of one device are taken one after another, in their order', async () => {
    const queue = new DeviceQueue();
    const first = gate();
    const steps: string[] = [];
    const slow = queue.run('a', async () => {
      steps.push('first begins');
      await first.passed;
      steps.push('first ends');
    });
    const quick = queue.run('a', async () => {
      steps.push('second');
    });
    await queue.run('b', async () => {
      steps.push('another device');
    });
    first.open();
    await Promise.all([slow, quick]);
    expect(steps).toEqual(['first begins', 'another device', 'first ends', 'second']);
  });

  it('that fail hold up none behind them', async () => {
    const queue = new DeviceQueue();
    const failing = queue.run('a', () => Promise.reject(new Error('planted')));
    const next = queue.run('a', () => Promise.resolve('done'));
    await expect(failing).rejects.toThrow('planted');
    await expect(next).resolves.toBe('done');
  });

  it('are refused while two hundred of the device wait, and taken again afterwards', async () => {
    const queue = new DeviceQueue();
    const first = gate();
    const waiting = Array.from({ length: 200 }, () => queue.run('a', () => first.passed));
    await expect(queue.run('a', () => Promise.resolve())).rejects.toMatchObject({
      status: 503,
      code: 'BUSY',
    });
    await expect(queue.run('b', () => Promise.resolve('other'))).resolves.toBe('other');
    first.open();
    await Promise.all(waiting);
    await expect(queue.run('a', () => Promise.resolve('again'))).resolves.toBe('again');
  });
});
