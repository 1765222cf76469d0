/** A job's quote as the desk shows it. Cost, hours and markup are null for those who may not see them. */
import type { DocumentState } from '@/lib/documents/schema';
import type { ShopSettings } from '@/lib/units/settings';
import type { QuoteTotals } from './content';
import type { CustomerStep } from './view';
import type { Blocker, LineChange, LineSource } from './lines';

export interface LineFigures {
  quantity: string;
  unitCost: string;
  unitLabourHours: string;
  labourRate: string;
  markupPct: string;
  costMinor: number;
}

export interface DeskLine {
  id: string;
  version: number;
  source: LineSource;
  areaName: string;
  description: string;
  amountMinor: number;
  taxable: boolean;
  optional: boolean;
  chosen: boolean;
  openStops: number;
  gone: boolean;
  changes: LineChange[];
  figures: LineFigures | null;
}

export interface DeskTerms {
  version: number;
  depositPct: string;
  discountPct: string;
  /** Null for those who may not see cost. */
  overheadPct: string | null;
  contingencyPct: string | null;
  taxName: string;
  taxRatePct: string;
  validDays: number;
  scopeNote: string;
  exclusions: string;
}

export interface DeskDraft {
  terms: DeskTerms;
  /** False where the job has no deposit or runs on terms. */
  depositApplies: boolean;
  pricesAt: Date;
  lines: DeskLine[];
  /** Change lines and circuits that the draft leaves out. */
  unused: { id: string; label: string; openStops: number }[];
  totals: QuoteTotals;
  cost: { costMinor: number; marginPct: number | null } | null;
  blockers: Blocker[];
  bodySha256: string;
  nextRevision: number;
  defaults: { labourRate: string; markupPct: string } | null;
}

export interface DeskEvent {
  id: string;
  kind: string;
  at: Date;
  by: string | null;
  note: string;
}

export interface DeskSent {
  documentId: string;
  revision: number;
  state: DocumentState;
  amountMinor: number;
  validUntil: string | null;
  sha256: string;
  hasPdf: boolean;
  sentTo: string;
  events: DeskEvent[];
  options: { id: string; text: string; amountMinor: number; chosen: boolean }[];
  acceptance: { name: string; at: Date; totalMinor: number; reference: string; sha256: string } | null;
}

export interface DeskQuote {
  job: { id: string; number: string; title: string; customerName: string; customerEmail: string };
  settings: ShopSettings;
  steps: { key: CustomerStep['key']; state: CustomerStep['state']; waitsFor: string | null }[];
  draft: DeskDraft | null;
  sent: DeskSent[];
  /** Who holds a key to the customer's page. */
  links: { id: string; email: string; open: boolean }[];
}
