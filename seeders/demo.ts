/** The invented shop and its jobs, made by the program's own commands with real engine results behind each. */
import { randomUUID } from 'node:crypto';
import type { Actor, Role } from '@/lib/access/policy';
import { systemActor } from '@/lib/access/command';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob, markSurveyDone } from '@/lib/jobs/commands';
import type { ClientEvent } from '@/lib/offline/protocol';
import { savePart } from '@/lib/parts/commands';
import { listParts } from '@/lib/parts/queries';
import { addMember } from '@/lib/people/commands';
import { setPassword } from '@/lib/platform/auth/sessions';
import { withShop } from '@/lib/platform/db';
import { applySurveyEvents } from '@/lib/surveys/commands';
import type { Collection } from '@/lib/surveys/schema';
import type { CircuitKind, TapeRun } from '@/lib/circuits/schema/electrical';
import { startingPoint } from '@/lib/circuits/schema/electrical';
import { demoParts } from './parts';

export interface DemoPerson {
  role: Role;
  email: string;
  name: string;
  licenceNumber?: string;
  mainsQualified?: boolean;
}

/** Adds people by the program's own command and gives each the password. @returns an actor for each role. */
export async function addPeople(
  shopId: string,
  people: DemoPerson[],
  password: string,
): Promise<Map<Role, Actor>> {
  const actors = new Map<Role, Actor>();
  for (const { role, email, name, licenceNumber = '', mainsQualified = false } of people) {
    const added = await addMember(systemActor(shopId, 'first start'), {
      name,
      email,
      roles: [role],
      licenceNumber,
      mainsQualified,
    });
    await setPassword(added.personId, password);
    actors.set(role, {
      sessionId: '',
      personId: added.personId,
      shopId,
      membershipId: added.id,
      name,
      roles: [role],
      licenceNumber,
      mainsQualified,
    });
  }
  return actors;
}

/** Sends edits to a job's survey as a phone would. */
export class SurveyPen {
  constructor(
    private readonly actor: Actor,
    private readonly jobId: string,
  ) {}

  async put(collection: Collection, body: object): Promise<string> {
    const event: ClientEvent = {
      id: randomUUID(),
      kind: `${collection}.put`,
      entityId: randomUUID(),
      baseVersion: null,
      body: { ...body },
      at: new Date().toISOString(),
    };
    const [answer] = await applySurveyEvents(this.actor, this.jobId, [event]);
    if (answer?.status !== 200)
      throw new Error(
        `${event.kind}: ${answer?.message ?? 'no answer'} ${JSON.stringify(answer?.issues ?? [])}`,
      );
    return event.entityId;
  }

  area(
    position: number,
    name: string,
    size: [number, number, number],
    weeklyHours: number,
    more: object = {},
  ): Promise<string> {
    const [lengthMetres, widthMetres, heightMetres] = size;
    return this.put('areas', {
      position,
      name,
      use: '',
      lengthMetres,
      widthMetres,
      heightMetres,
      weeklyHours,
      ambientCelsius: 24,
      environment: 'dry',
      hazards: {},
      notes: '',
      ...more,
    });
  }

  luminaire(
    areaId: string,
    luminaireType: string,
    quantity: number,
    watts: number,
    electrical: object = {},
    more: object = {},
  ): Promise<string> {
    return this.put('luminaires', {
      areaId,
      luminaireType,
      quantity,
      countConfidence: 'counted',
      watts,
      wattsSource: 'typical',
      supplyVolts: 120,
      electrical: {
        lampType: '',
        ballast: 'unknown',
        lampholder: 'unknown',
        dimmer: 'none',
        emergency: 'none',
        breakerAmps: 20,
        ...electrical,
      },
      notes: '',
      ...more,
    });
  }

  cove(areaId: string, name: string, tapeMetres: number, driverMetres: number): Promise<string> {
    return this.put('coves', { areaId, name, tapeMetres, driverMetres, notes: '' });
  }

  change(
    areaId: string,
    existingLuminaireId: string | null,
    action: string,
    newPartId: string,
    quantity: number,
    circuitId: string | null = null,
  ): Promise<string> {
    return this.put('change-lines', {
      areaId,
      existingLuminaireId,
      circuitId,
      position: 0,
      action,
      oldQuantity: existingLuminaireId ? quantity : 0,
      newPartId,
      newType: '',
      newQuantity: quantity,
      newWatts: null,
      electrical: {
        lampholdersReplaced: action === 'bypass',
        disconnectAdded: true,
        emergencyFeedAfter: 'unknown',
        emergencyDriverAfter: 'unknown',
      },
      notes: '',
    });
  }

  circuit(
    areaId: string,
    kind: CircuitKind,
    name: string,
    electrical: object,
    roles: object,
    coveId: string | null = null,
  ): Promise<string> {
    return this.put('circuits', {
      areaId,
      coveId,
      kind,
      name,
      choices: { roles },
      electrical: { ...startingPoint(kind, 'us'), ...electrical },
    });
  }
}

export type PartIds = (sku: string) => { id: string; datasheet: Record<string, unknown> };

export async function addParts(actor: Actor): Promise<PartIds> {
  for (const part of demoParts) await savePart(actor, part);
  const rows = await withShop(actor.shopId, () => listParts());
  return (sku) => {
    const row = rows.find((one) => one.sku === sku);
    if (!row) throw new Error(`The demo has no part ${sku}.`);
    return { id: row.id, datasheet: row.datasheet };
  };
}

async function openJob(
  actor: Actor,
  customer: { name: string; contactName: string; email: string; phone: string; address: string },
  site: string,
  title: string,
): Promise<string> {
  const { id } = await saveCustomer(actor, { ...customer, consumer: false, notes: '' });
  return (await createJob(actor, { customerId: id, siteName: site, siteAddress: customer.address, title }))
    .id;
}

/** Surveyed and figured: what waits is its quote. */
export async function bakery(owner: Actor, part: PartIds): Promise<string> {
  const jobId = await openJob(
    owner,
    {
      name: 'Tarn Lane Bakery',
      contactName: 'Ines Varga',
      email: 'ines@tarnlane.example.com',
      phone: '555-0142',
      address: '14 Tarn Lane',
    },
    'Tarn Lane Bakery',
    'New lighting for the counter and back room',
  );
  const pen = new SurveyPen(owner, jobId);
  const back = await pen.area(0, 'Back room', [9.1, 7.3, 3], 78, { use: 'Bakehouse' });
  const counter = await pen.area(1, 'Counter', [8, 4.2, 2.9], 66, { use: 'Sales' });
  const old = await pen.luminaire(back, '4-lamp F32T8 4ft electronic BF 0.88', 12, 112, {
    ballast: 'instant-start',
    lampholder: 'shunted',
  });
  const cove = await pen.cove(counter, 'Counter cove', 4.8, 2.5);
  const branch = await pen.circuit(
    back,
    'branch-circuit',
    'Back room lights',
    {
      luminaire: 'Flat panel 2 x 4 ft, 35 W',
      quantity: 12,
      voltAmps: 37,
      metres: 18,
      spacingMetres: 2.4,
      unitsPerBreaker: 32,
    },
    { luminaire: part('FP-2x4-35').id, cable: part('CA-12-2').id },
  );
  await pen.change(back, old, 'new-luminaire', part('FP-2x4-35').id, 12, branch);
  await pen.circuit(
    counter,
    'tape-run',
    'Counter cove, tape run',
    {
      tape: part('TP-24-144').datasheet as TapeRun['tape'],
      runMetres: 4.8,
      driverMetres: 2.5,
      feed: 'both',
      driver: { volts: 24, watts: 96, classTwo: true },
    },
    { tape: part('TP-24-144').id, driver: part('DR-24-96').id, cable: part('CA-16-2').id },
    cove,
  );
  await markSurveyDone(owner, { jobId, done: true });
  return jobId;
}

/** Half surveyed, one count still estimated. */
export async function dentalPractice(owner: Actor): Promise<string> {
  const jobId = await openJob(
    owner,
    {
      name: 'Quill Dental',
      contactName: 'Dr Amara Quill',
      email: 'practice@quilldental.example.com',
      phone: '555-0167',
      address: '3 Orchard Court',
    },
    'Quill Dental',
    'Lobby and treatment rooms',
  );
  const pen = new SurveyPen(owner, jobId);
  const lobby = await pen.area(0, 'Lobby', [6.4, 5, 2.7], 50, { use: 'Waiting' });
  await pen.luminaire(
    lobby,
    '2-lamp F32T8 4ft electronic BF 0.88',
    8,
    59,
    { ballast: 'instant-start' },
    { countConfidence: 'estimated' },
  );
  return jobId;
}

/** A boat's 12 V system: bench work. */
export async function chandlery(owner: Actor, part: PartIds): Promise<string> {
  const jobId = await openJob(
    owner,
    {
      name: 'Marlpit Chandlery',
      contactName: 'Joss Pell',
      email: 'joss@marlpit.example.com',
      phone: '555-0119',
      address: 'Quay 2, Marlpit',
    },
    'Sailing boat at quay 2',
    'Cabin lights on the 12 V battery',
  );
  const pen = new SurveyPen(owner, jobId);
  const cabin = await pen.area(0, 'Cabin', [4.2, 2.1, 1.9], 20, { environment: 'damp' });
  await pen.circuit(
    cabin,
    'resistor-array',
    'Cabin array',
    { count: 12, supplyVolts: 12.6, supplyMinVolts: 11, supplyMaxVolts: 14.4 },
    { led: part('LED-WW-20').id, resistor: part('RES-0.5').id },
  );
  return jobId;
}
