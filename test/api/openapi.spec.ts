import { spawnSync } from 'node:child_process';
import request from 'supertest';
import { endpoints } from '@shared/contracts/api';
import { startTestApplication, type TestApplication } from './test-application';

/** What a validator of the OpenAPI schema says; it is a module that Jest can't load, so it runs by itself. */
function objectionTo(document: unknown): string {
  const script = `
    const parser = require('@apidevtools/swagger-parser');
    const document = JSON.parse(require('node:fs').readFileSync(0, 'utf8'));
    parser.validate(document).catch((error) => { console.error(error.message); process.exitCode = 1; });`;
  const { status, stderr } = spawnSync(process.execPath, ['--no-warnings', '-e', script], {
    input: JSON.stringify(document),
    encoding: 'utf8',
  });
  return status === 0 ? '' : stderr;
}

describe('the API', () => {
  let application: TestApplication;
  beforeAll(async () => {
    application = await startTestApplication();
  });
  afterAll(() => application.stop());

  it('describes itself as valid OpenAPI 3.1, with every endpoint', async () => {
    const reply = await request(application.express).get('/api/v1/openapi.json').expect(200);
    const document = reply.body as { openapi: string; paths: Record<string, Record<string, unknown>> };
    expect(document.openapi).toMatch(/^3\.1\./);
    expect(objectionTo(document)).toBe('');
    // The validator does object to what is none.
    expect(objectionTo({ ...document, info: {} })).toContain("must have required property 'title'");
    const described = Object.values(document.paths).flatMap((path) => Object.keys(path));
    expect(described).toHaveLength(endpoints.length);
  });

  it('answers an address that it does not have with a problem', async () => {
    const reply = await request(application.express).get('/api/v1/nothing-here').expect(404);
    expect(reply.headers['content-type']).toMatch(/^application\/problem\+json/);
    expect(reply.body).toMatchObject({ status: 404, code: 'NOT_FOUND' });
  });

  it('lets nothing run that is not its own', async () => {
    const reply = await request(application.express).get('/api/v1/openapi.json');
    const policy = reply.headers['content-security-policy'] ?? '';
    expect(policy).toContain("script-src 'self'");
    expect(policy).not.toContain("script-src 'self' 'unsafe-inline'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(reply.headers['x-powered-by']).toBeUndefined();
  });

  it('refuses a body that is no JSON without falling over', async () => {
    const reply = await request(application.express)
      .post('/api/v1/session')
      .set('Content-Type', 'application/json')
      .send('{"email": ')
      .expect(400);
    expect(reply.body).toMatchObject({ code: 'BAD_REQUEST' });
  });
});
