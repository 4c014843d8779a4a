/** Where files are kept: a folder on this machine, or an object store that speaks S3. Chosen by configuration alone. */
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import type { Config } from '../../config.ts';

export interface FileStore {
  put(key: string, bytes: Uint8Array): Promise<void>;
  /** The bytes, or null where there is no such file. */
  get(key: string): Promise<Uint8Array | null>;
}

export function fileStore(files: Config['files']): FileStore {
  return 'dir' in files ? diskStore(files.dir) : s3Store(files);
}

/** Keys are our own ids, so that no name of a user's ever becomes a path. */
const KEY = /^[0-9a-f-]{36}\/[0-9a-f-]{36}$/;

function diskStore(dir: string): FileStore {
  const path = (key: string) => {
    if (!KEY.test(key)) throw new Error('not a key of ours');
    return join(dir, key);
  };
  return {
    async put(key, bytes) {
      await mkdir(dirname(path(key)), { recursive: true, mode: 0o700 });
      await writeFile(path(key), bytes, { mode: 0o600 });
    },
    async get(key) {
      try {
        return await readFile(path(key));
      } catch (error) {
        if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return null;
        throw error;
      }
    },
  };
}

function s3Store(files: {
  readonly bucket: string;
  readonly endpoint: string | null;
  readonly region: string;
}): FileStore {
  const client = new S3Client({
    region: files.region,
    forcePathStyle: true,
    ...(files.endpoint === null ? {} : { endpoint: files.endpoint }),
  });
  return {
    async put(key, bytes) {
      await client.send(new PutObjectCommand({ Bucket: files.bucket, Key: key, Body: Buffer.from(bytes) }));
    },
    async get(key) {
      try {
        const found = await client.send(new GetObjectCommand({ Bucket: files.bucket, Key: key }));
        return (await found.Body?.transformToByteArray()) ?? null;
      } catch (error) {
        if (error instanceof Error && error.name === 'NoSuchKey') return null;
        throw error;
      }
    },
  };
}
