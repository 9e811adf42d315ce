import type { ChildProcess } from 'node:child_process';
import path from 'node:path';

const script = async <T>(name: string) => (await import(path.resolve('scripts/lib', name))) as T;

type Account = { cwd: string; uid?: number; gid?: number };
type Cluster = { programs: string; folder: string; account: Account };
type ServerSettings = { port: number; databaseUrl: string; secret: string };

const { databaseAccount, makeFolderFor } = await script<{
  databaseAccount: (folder: string) => Promise<Account>;
  makeFolderFor: (account: Account, folders: string[]) => Promise<string>;
}>('account.mjs');
const { createDatabase } = await script<{ createDatabase: (url: string, name: string) => Promise<string> }>('database-url.mjs');
const { freePort } = await script<{ freePort: () => Promise<number> }>('ports.mjs');
const postgres = await script<{
  postgresPrograms: () => Promise<string>;
  initCluster: (cluster: Cluster & { password: string }) => Promise<void>;
  startCluster: (cluster: Cluster & { port: number; options?: string[] }) => Promise<string | undefined>;
  stopCluster: (cluster: Cluster) => Promise<void>;
  runningCluster: (folder: string) => { pid: number; port: number } | undefined;
}>('postgres.mjs');
const { endChild } = await script<{ endChild: (child: ChildProcess) => Promise<void> }>('processes.mjs');
const { startWebServer } = await script<{ startWebServer: (settings: ServerSettings) => Promise<{ url: string; child: ChildProcess }> }>('web-server.mjs');

export { createDatabase, databaseAccount, endChild, freePort, makeFolderFor, postgres, startWebServer, type Cluster, type ServerSettings };
