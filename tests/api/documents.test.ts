/** Files (FAULTS S-17, F-21, F-22, F-33): told by content, kept under ids of our own, given back as attachments only. */
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { documentJson } from '../../shared/schemas/documents.ts';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
});
afterAll(() => server.close());

const upload = (bytes: Buffer, filename: string, contentType = 'application/octet-stream', by = owner) =>
  by.send('post', '/documents').attach('file', bytes, { filename, contentType });

const PDF = Buffer.from('%PDF-1.7\n1 0 obj <<>> endobj');
const PNG = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex');

describe('a file', () => {
  it.each([
    ['invoice.pdf', PDF, 'application/pdf'],
    ['photo.png', PNG, 'image/png'],
    ['photo.jpg', Buffer.from('ffd8ffe000104a464946', 'hex'), 'image/jpeg'],
    ['photo.webp', Buffer.from('RIFF\u0010\u0000\u0000\u0000WEBPVP8 ', 'latin1'), 'image/webp'],
    ['lines.csv', Buffer.from('lot,gross_g\nG26-0001-X,1.5\n'), 'text/csv'],
  ])('%s is kept with its digest and given back as an attachment', async (name, bytes, media_type) => {
    const kept = await upload(bytes, name);
    expect(kept.status).toBe(201);
    const document = documentJson.parse(kept.body);
    expect(document).toMatchObject({
      name,
      media_type,
      sha256: createHash('sha256').update(bytes).digest('hex'),
    });
    const back = await owner
      .get(`/documents/${document.id}`)
      .buffer(true)
      .parse((response, done) => {
        const parts: Buffer[] = [];
        response.on('data', (part: Buffer) => parts.push(part));
        response.on('end', () => done(null, Buffer.concat(parts)));
      });
    expect(back.headers['content-disposition']).toBe(`attachment; filename=${name}`);
    expect(back.headers['content-type']).toContain(media_type);
    expect(back.headers['x-content-type-options']).toBe('nosniff');
    expect(back.headers['content-security-policy']).toContain('sandbox');
    expect(bytes.equals(Buffer.isBuffer(back.body) ? back.body : Buffer.alloc(0))).toBe(true);
  });

  it.each([
    ['a program under a picture’s name', 'photo.png', Buffer.from('4d5a90000300', 'hex'), 'image/png'],
    ['a page', 'page.html', Buffer.from('<html><script>alert(1)</script></html>'), 'text/html'],
    ['a page under a table’s name', 'lines.csv', Buffer.from('  <script>alert(1)</script>'), 'text/csv'],
    [
      'a drawing that can run',
      'mark.svg',
      Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" onload="x()"/>'),
      'image/svg+xml',
    ],
    [
      'XML with entities',
      'a.xml',
      Buffer.from('<!DOCTYPE x [<!ENTITY e SYSTEM "file:///etc/passwd">]><x>&e;</x>'),
      'text/xml',
    ],
    ['an archive', 'a.zip', Buffer.from('504b0304', 'hex'), 'application/zip'],
    ['nothing but its name', 'invoice.pdf', Buffer.from('not a pdf'), 'application/pdf'],
    ['a table with bytes that are no text', 'lines.csv', Buffer.from([0x61, 0xff, 0xfe, 0x00]), 'text/csv'],
  ])('that is %s is refused by its content', async (_what, name, bytes, type) => {
    expect((await upload(bytes, name, type)).status).toBe(415);
  });

  it('of more than 10 MB is refused', async () => {
    expect((await upload(Buffer.concat([PDF, Buffer.alloc(10_000_001)]), 'big.pdf')).status).toBe(413);
  });

  it('is one at a time, and has to be there', async () => {
    const two = owner.send('post', '/documents').attach('file', PDF, 'a.pdf').attach('file', PDF, 'b.pdf');
    expect((await two).status).toBe(400);
    expect((await owner.send('post', '/documents').field('note', 'x')).status).toBe(400);
  });

  it.each([
    ['../../etc/passwd.pdf', 'passwd.pdf'],
    ['..\\..\\boot.pdf', 'boot.pdf'],
    ['<img src=x onerror=alert(1)>.pdf', '_img src=x onerror=alert(1)_.pdf'],
    ['a\r\nX-Evil: 1.pdf', null],
    ['rechnung \u202Efdp.exe.pdf', 'rechnung _fdp.exe.pdf'],
  ])('called %j becomes no path and no header', async (given, expected) => {
    const kept = await upload(PDF, given);
    expect([201, 400]).toContain(kept.status);
    if (kept.status !== 201) return;
    const document = documentJson.parse(kept.body);
    expect(document.name).not.toMatch(/[/\\<>\r\n\u202E]/);
    if (expected !== null) expect(document.name.endsWith(expected.replace(/^_/, ''))).toBe(true);
    const back = await owner.get(`/documents/${document.id}`);
    expect(back.headers['x-evil']).toBeUndefined();
  });

  it('is not there for another workshop, and read by no goldsmith', async () => {
    const { id } = documentJson.parse((await upload(PDF, 'a.pdf')).body);
    const stranger = await signUp(server, 'Second bench');
    expect((await stranger.get(`/documents/${id}`)).status).toBe(404);
    const goldsmith = await addMember(server, owner, 'goldsmith', 'Corin Dask');
    expect((await goldsmith.get(`/documents/${id}`)).status).toBe(403);
  });
});
