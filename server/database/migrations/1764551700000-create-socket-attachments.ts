import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Live events too large for a notification travel through this table, with columns as the socket.io adapter wants them. */
export class CreateSocketAttachments1764551700000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE socket_io_attachment (
        id bigserial NOT NULL,
        created_at timestamptz NOT NULL DEFAULT now(),
        payload bytea,
        CONSTRAINT socket_io_attachment_pkey PRIMARY KEY (id)
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE socket_io_attachment`);
  }
}
