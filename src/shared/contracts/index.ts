import { accountContracts } from './accounts.ts';
import { callContracts } from './calls.ts';
import type { Contract } from './contract.ts';
import { floorContracts } from './floor.ts';

/** Every route there is, slice by slice. A test fails when a contract file isn't here, or a contract isn't mounted. */
export const contractsOfSlices: Readonly<Record<string, Readonly<Record<string, Contract>>>> = {
  accounts: accountContracts,
  calls: callContracts,
  floor: floorContracts,
};

export const allContracts: readonly Contract[] = Object.values(contractsOfSlices).flatMap((slice) => Object.values(slice));
