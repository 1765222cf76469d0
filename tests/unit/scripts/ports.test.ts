import { mkdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:net';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { GENERATED, isFree, keptPorts, keptSecrets } from '../../../docker-free-scripts/lib/ports.mjs';
import { ownFolder, startNode } from './support/child';

const servers: Server[] = [];
function occupy(port: number): Promise<void> {
  const server = createServer();
  servers.push(server);
  return new Promise((done) => server.listen(port, '127.0.0.1', () => done()));
}
afterEach(() => servers.splice(0).forEach((server) => server.close()));

const permissions = (file: string) => statSync(file).mode & 0o777;
type Ports = Record<string, number>;

describe('ports', () => {
  it('stay the same over restarts, in a private file', async () => {
    const data = join(ownFolder(), '.data');
    const first: Ports = await keptPorts(data, ['app', 'mail']);
    const second: Ports = await keptPorts(data, ['app', 'mail', 'objects']);
    expect(second).toMatchObject(first);
    expect(new Set(Object.values(second)).size).toBe(3);
    expect(permissions(join(data, 'ports.json'))).toBe(0o600);
    expect(permissions(data)).toBe(0o700);
  });

  it('lie below the range of outgoing connections, and nothing listens there', async () => {
    const ports: Ports = await keptPorts(ownFolder(), ['a', 'b', 'c']);
    for (const port of Object.values(ports)) {
      expect(port).toBeGreaterThanOrEqual(20_000);
      expect(port).toBeLessThan(32_768);
      expect(await isFree(port)).toBe(true);
    }
  });

  it('move when another process has taken one, and only that one, for good', async () => {
    const data = ownFolder();
    const first: Ports = await keptPorts(data, ['app', 'mail']);
    const listen = `require('node:net').createServer().listen(${first.app}, '127.0.0.1', () => console.log('up'));`;
    const { child } = await startNode(['-e', listen]);
    const second: Ports = await keptPorts(data, ['app', 'mail']);
    expect(second.app).not.toBe(first.app);
    expect(second.mail).toBe(first.mail);
    child.kill('SIGKILL');
    expect(await keptPorts(data, ['app', 'mail'])).toEqual(second);
  });

  it('take the preferred one when it is free, another when it is not', async () => {
    const { wish }: Ports = await keptPorts(ownFolder(), ['wish']);
    expect(await keptPorts(ownFolder(), ['app'], { app: wish })).toEqual({ app: wish });
    await occupy(wish!);
    const { app }: Ports = await keptPorts(ownFolder(), ['app'], { app: wish });
    expect(app).not.toBe(wish);
  });
});

describe('secrets', () => {
  it('are made once, differ, are private, and can be told from a person’s own', () => {
    const data = ownFolder();
    const first: Record<string, string> = keptSecrets(data, ['link', 'audit']);
    expect(keptSecrets(data, ['link', 'audit'])).toEqual(first);
    expect(first.link).not.toBe(first.audit);
    expect(first.link).toMatch(new RegExp(`^${GENERATED}[0-9a-f]{48}$`));
    expect(permissions(join(data, 'secrets.json'))).toBe(0o600);
  });

  it('are not replaced when their file is damaged: the database knows the old ones', () => {
    const data = ownFolder();
    mkdirSync(data, { recursive: true });
    writeFileSync(join(data, 'secrets.json'), '{"link": "half');
    expect(() => keptSecrets(data, ['link'])).toThrow(/secrets\.json is not readable/);
    expect(readFileSync(join(data, 'secrets.json'), 'utf8')).toBe('{"link": "half');
  });
});
