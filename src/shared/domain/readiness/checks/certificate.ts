import { type CheckResult, result } from '../check.ts';
import type { LaneSituation } from '../situation.ts';

/** Sanctioned play: the lane's certificate is valid on that date, and free-fall and string machines aren't mixed. */
export function checkCertificate(at: LaneSituation): CheckResult {
  const { session, facts, families } = at;
  if (!session.sanctioned) return result('certificate', 'ok', 'certificate.not-needed');
  const desk = { waitsFor: { kind: 'desk' as const, name: null } };
  if (new Set(families).size > 1) return result('certificate', 'holds', 'certificate.families-mixed', desk);
  if (!facts || facts.certifiedUntil === null) return result('certificate', 'holds', 'certificate.none', desk);
  if (facts.certifiedUntil < session.date) return result('certificate', 'holds', 'certificate.expired', { ...desk, params: { date: facts.certifiedUntil } });
  return result('certificate', 'ok', 'certificate.valid', { params: { date: facts.certifiedUntil } });
}
