import type Database from 'better-sqlite3';
import type {
  BriefingTextView,
  ProposedVersionView,
  WholeVersionView,
} from '../../../shared/contracts/safety';
import { currentVersion, questionSheet, type BriefingBody, type VersionKind } from '../../../shared/safety';
import { prepared } from '../../realtime/live-source';

interface RawText {
  briefing_id: string;
  title: string;
  version: number;
  kind: VersionKind;
  effective_from: number;
  what_changed: string | null;
  body: string;
  status: 'proposed' | 'published';
  published_by: string | null;
  published_at: number;
}

const readTexts = (db: Database.Database, installationId: string, key: string): RawText[] =>
  prepared<RawText>(
    db,
    `SELECT v.briefing_id, briefing.title, v.version, v.kind, v.effective_from, v.what_changed, v.body, v.status,
            v.published_by, v.published_at
     FROM briefing JOIN briefing_version AS v ON v.briefing_id = briefing.id
     WHERE briefing.installation_id = ? AND briefing.key = ? ORDER BY v.version`,
  ).all(installationId, key);

/**
 * One published version as people read it, without the right answers.
 * @param version a number, or undefined for the one in force
 * @returns null when there is none
 */
export function readBriefingText(
  db: Database.Database,
  installationId: string,
  key: string,
  version: number | undefined,
  now: number,
): BriefingTextView | null {
  const texts = readTexts(db, installationId, key).filter((text) => text.status === 'published');
  const dated = texts.map((text) => ({
    version: text.version,
    kind: text.kind,
    effectiveFrom: text.effective_from,
  }));
  const wanted = version ?? (currentVersion(dated, now) ?? dated[0])?.version;
  const text = texts.find((one) => one.version === wanted);
  if (!text) return null;
  const body = JSON.parse(text.body) as BriefingBody;
  return {
    briefingId: text.briefing_id,
    key,
    title: text.title,
    version: text.version,
    kind: text.kind,
    effectiveFrom: text.effective_from,
    whatChanged: text.what_changed,
    body: { ...body, questions: questionSheet(body) },
  };
}

/** The newest published version with its right answers; null when there is no such briefing. */
export function readNewestVersion(
  db: Database.Database,
  installationId: string,
  key: string,
): WholeVersionView | null {
  const newest = readTexts(db, installationId, key).findLast((text) => text.status === 'published');
  if (!newest) return null;
  return {
    version: newest.version,
    effectiveFrom: newest.effective_from,
    body: JSON.parse(newest.body) as BriefingBody,
  };
}

/** Corrections that wait for a second lead, whole; null when there is no such briefing. */
export function readProposals(
  db: Database.Database,
  installationId: string,
  key: string,
): ProposedVersionView[] | null {
  const texts = readTexts(db, installationId, key);
  if (texts.length === 0) return null;
  return texts
    .filter((text) => text.status === 'proposed')
    .map((text) => ({
      briefingId: text.briefing_id,
      version: text.version,
      proposedBy: text.published_by ?? '',
      at: text.published_at,
      whatChanged: text.what_changed,
      body: JSON.parse(text.body) as BriefingBody,
    }));
}

/** The signature of one sign-off; null when there is none, or none any more. */
export function readSignature(
  db: Database.Database,
  installationId: string,
  signOffId: string,
): { kind: 'typed' | 'drawn'; value: string } | null {
  const row = prepared<{ signature: string | null }>(
    db,
    'SELECT signature FROM sign_off WHERE id = ? AND installation_id = ?',
  ).get(signOffId, installationId);
  return row?.signature ? (JSON.parse(row.signature) as { kind: 'typed' | 'drawn'; value: string }) : null;
}
