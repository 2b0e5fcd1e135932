import { accountContracts } from './accounts.ts';
import { apiContracts } from './api.ts';
import { callContracts } from './calls.ts';
import { centreContracts } from './centre.ts';
import type { Contract } from './contract.ts';
import { floorContracts } from './floor.ts';
import { ingestContracts } from './ingest.ts';
import { leagueContracts } from './leagues.ts';
import { numbersContracts } from './numbers.ts';
import { readinessContracts } from './readiness.ts';
import { runContracts } from './runs.ts';

/** Every route there is, slice by slice. A test fails when a contract file isn't here, or a contract isn't mounted. */
export const contractsOfSlices: Readonly<Record<string, Readonly<Record<string, Contract>>>> = {
  accounts: accountContracts,
  api: apiContracts,
  calls: callContracts,
  centre: centreContracts,
  floor: floorContracts,
  ingest: ingestContracts,
  leagues: leagueContracts,
  numbers: numbersContracts,
  readiness: readinessContracts,
  runs: runContracts,
};

export const allContracts: readonly Contract[] = Object.values(contractsOfSlices).flatMap((slice) => Object.values(slice));
