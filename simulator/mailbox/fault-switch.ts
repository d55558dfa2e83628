import * as z from 'zod';

/** What the mailbox can be told to do wrong, for tests of those who send to it. */
export const faultRequest = z.strictObject({
  mode: z.enum(['none', 'refuse-temporarily', 'refuse-permanently', 'drop-connection']),
  /** How many mails it concerns; all until told otherwise, when it is left out. */
  count: z.number().int().positive().optional(),
});
export type FaultRequest = z.infer<typeof faultRequest>;
export type FaultMode = FaultRequest['mode'];

/** Decides for each mail whether something goes wrong. */
export class FaultSwitch {
  private mode: FaultMode = 'none';
  private left = 0;

  /** Sets what goes wrong from the next mail on. */
  set({ mode, count = Infinity }: FaultRequest): void {
    this.mode = mode;
    this.left = count;
  }

  /** What goes wrong with the mail that is about to be handed over. */
  take(): FaultMode {
    if (this.left <= 0) return 'none';
    this.left -= 1;
    return this.mode;
  }
}
