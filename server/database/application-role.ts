import { escapeIdentifier } from 'pg';
import type { DataSource } from 'typeorm';

/**
 * Lets the application's role do what the application does, and no more: rows come, change and go, but tables stay as they
 * are, and what was noted in the audit stays as it was noted. Months of readings are made by a function with its owner's rights.
 *
 * @param owner - Connected as the owner of the tables.
 * @param role - Of the application.
 */
export async function grantToApplication(owner: DataSource, role: string): Promise<void> {
  const application = escapeIdentifier(role);
  await owner.transaction(async (tx) => {
    await tx.query(`GRANT USAGE ON SCHEMA public TO ${application}`);
    await tx.query(`GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA public TO ${application}`);
    await tx.query(`GRANT USAGE ON ALL SEQUENCES IN SCHEMA public TO ${application}`);
    await tx.query(`REVOKE UPDATE, DELETE ON audit_entry FROM ${application}`);
    await tx.query(`REVOKE ALL ON migration FROM ${application}`);
  });
}
