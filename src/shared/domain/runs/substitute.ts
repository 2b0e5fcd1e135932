import { cannotLay, type MachineCapability } from './capability.ts';
import { nearestPattern, type NearestPattern } from './nearest.ts';
import type { PatternRevision } from './pattern.ts';

/** Search nodes: a few milliseconds; beyond it the best so far is shown as such. */
const MAX_NODES = 20_000;
const OIL = { oil: true, clean: false, deckTreatment: false };

/**
 * The nearest pattern that a machine with one volume can lay in place of one that it can't: whole loads of its own volume, all with a product
 * that it carries. Null where the machine lays the pattern itself, has volumes of its own to choose, or something else keeps it from it.
 */
export function substituteFor(machine: MachineCapability, revision: PatternRevision): NearestPattern | null {
  const [product] = machine.products;
  if (machine.volume.kind !== 'fixed' || product === undefined || cannotLay(machine, revision, OIL).length === 0) return null;
  const carried = { ...revision, passes: revision.passes.map((pass) => ({ ...pass, product: machine.products.includes(pass.product) ? pass.product : product })) };
  const nearest = nearestPattern(carried, machine.volume.ul, { maxLoads: machine.maxLoads, maxNodes: MAX_NODES });
  return cannotLay(machine, nearest.revision, OIL).length === 0 ? nearest : null;
}
