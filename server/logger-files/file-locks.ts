import type { Transactions, Tx } from '../database/transactions';

/** First key of the advisory locks of files; any number that nobody else uses. */
const LOCK_SPACE = 7_431_907;

interface LockConnection {
  readonly tx: Tx;
  release(): Promise<void>;
}

/**
 * Says which files this process is at work on, in a way that dies with the process: locks of one database connection. A
 * file in work whose lock can be had was left behind by a process that is no more.
 */
export class FileLocks {
  private readonly held = new Set<string>();
  private connection: Promise<LockConnection> | null = null;

  constructor(private readonly transactions: Transactions) {}

  /**
   * Takes the lock of a file.
   *
   * @returns False when somebody, in this process or another, has it.
   */
  async take(fileId: string): Promise<boolean> {
    if (this.held.has(fileId)) return false;
    this.held.add(fileId);
    try {
      this.connection ??= this.transactions.connection();
      const { tx } = await this.connection;
      const rows: { got: boolean }[] = await tx.query(
        'SELECT pg_try_advisory_lock($1, hashtext($2)) AS got',
        [LOCK_SPACE, fileId],
      );
      const got = rows[0]?.got === true;
      if (!got) await this.forget(fileId);
      return got;
    } catch (error) {
      await this.forget(fileId);
      throw error;
    }
  }

  /** Gives the lock of a file back. */
  async release(fileId: string): Promise<void> {
    const { connection } = this;
    if (!this.held.has(fileId) || connection === null) return;
    try {
      await (await connection).tx.query('SELECT pg_advisory_unlock($1, hashtext($2))', [LOCK_SPACE, fileId]);
    } catch {
      // The connection is gone, and its locks with it.
    }
    await this.forget(fileId);
  }

  private async forget(fileId: string): Promise<void> {
    this.held.delete(fileId);
    const { connection } = this;
    if (this.held.size > 0 || connection === null) return;
    this.connection = null;
    await connection.then((open) => open.release()).catch(() => undefined); // Gone already.
  }
}
