import type { TestProject } from 'vitest/node';
import { migrate } from '../../lib/scripts/migrate.mjs';
import { throwawayCluster } from '../../lib/scripts/throwaway.mjs';

declare module 'vitest' {
  export interface ProvidedContext {
    databaseUrl: string;
    ownerUrl: string;
  }
}

/** One throwaway cluster for all the server tests of a run; each test makes a team of its own in it. */
export default async function setup(project: TestProject) {
  const cluster = await throwawayCluster();
  await cluster.createDatabase('ohmstead');
  await migrate(cluster.url('ohmstead', 'owner'));
  project.provide('databaseUrl', cluster.url('ohmstead'));
  project.provide('ownerUrl', cluster.url('ohmstead', 'owner'));
  return () => cluster.stop();
}
