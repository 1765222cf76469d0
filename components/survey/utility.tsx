'use client';
/** The utility's account and its bills: what a kilowatt-hour and a kilowatt cost here. */
import { Button } from '@/components/ui/button';
import { CheckBox } from '@/components/ui/field';
import { Sheet } from '@/components/ui/sheet';
import type { Bill, UtilityAccount } from '@/lib/surveys/schema/site';
import { DateField, LineField, NotesField, NumberField } from './fields';
import type { Kept, Survey } from './use-survey';

const DAY = 86_400_000;
const isoDay = (at: number) => new Date(at).toISOString().slice(0, 10);

/** The month after the last bill; without one, the thirty days that end today. */
function nextBill(bills: readonly Bill[]): Bill {
  const last = bills.at(-1);
  const from = last ? Date.parse(last.to) + DAY : Date.now() - 30 * DAY;
  return {
    from: isoDay(from),
    to: isoDay(from + 29 * DAY),
    kilowattHours: 0,
    demandKilowatts: null,
    amount: null,
  };
}

function Bills({ one, survey }: { one: Kept<UtilityAccount>; survey: Survey }) {
  const { bills } = one.data;
  const write = (next: Bill[]) => survey.edit('utility-accounts', one, { bills: next });
  const currency = survey.settings.currency;
  return (
    <section aria-label={`Bills of ${one.data.utility}`}>
      <h3 className="mb-2 text-lg">Bills</h3>
      <ul>
        {bills.map((bill, index) => {
          const set = (change: Partial<Bill>) =>
            write(bills.map((own, at) => (at === index ? { ...own, ...change } : own)));
          return (
            <li
              key={index}
              className="grid grid-cols-2 items-start gap-3 border-t border-rule py-3 sm:grid-cols-[1fr_1fr_1fr_1fr_1fr_auto]"
            >
              <DateField label="From" value={bill.from} onSave={(from) => from && set({ from })} />
              <DateField
                label="To"
                value={bill.to}
                error={bill.to < bill.from ? 'Not before the first day.' : undefined}
                onSave={(to) => to && set({ to })}
              />
              <NumberField
                label="Energy"
                unit="kWh"
                min={0}
                required="Type the energy."
                value={bill.kilowattHours}
                onSave={(kilowattHours) => set({ kilowattHours: kilowattHours ?? 0 })}
              />
              <NumberField
                label="Demand"
                unit="kW"
                min={0}
                value={bill.demandKilowatts}
                onSave={(demandKilowatts) => set({ demandKilowatts })}
              />
              <NumberField
                label="Amount"
                unit={currency}
                min={0}
                value={bill.amount}
                onSave={(amount) => set({ amount })}
              />
              <Button
                look="danger"
                className="self-end"
                onClick={() => write(bills.filter((_, at) => at !== index))}
              >
                Take out<span className="sr-only"> the bill from {bill.from}</span>
              </Button>
            </li>
          );
        })}
      </ul>
      <Button look="secondary" onClick={() => write([...bills, nextBill(bills)])}>
        Add a bill
      </Button>
    </section>
  );
}

function Account({ one, survey }: { one: Kept<UtilityAccount>; survey: Survey }) {
  const set = (change: Partial<UtilityAccount>) => survey.edit('utility-accounts', one, change);
  const { currency } = survey.settings;
  return (
    <div className="flex flex-col gap-4 border-t border-rule pt-4 first:border-0 first:pt-0">
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-3">
        <LineField
          label="Utility"
          required="Name the utility."
          value={one.data.utility}
          onSave={(utility) => set({ utility })}
        />
        <LineField
          label="Account number"
          value={one.data.accountNumber}
          onSave={(accountNumber) => set({ accountNumber })}
        />
        <LineField
          label="Rate schedule"
          value={one.data.rateSchedule}
          onSave={(rateSchedule) => set({ rateSchedule })}
        />
        <NumberField
          label="Energy, a kWh"
          unit={currency}
          min={0}
          value={one.data.energyRate}
          onSave={(energyRate) => set({ energyRate })}
        />
        <NumberField
          label="Demand, a kW and month"
          unit={currency}
          min={0}
          value={one.data.demandRate}
          onSave={(demandRate) => set({ demandRate })}
        />
        <CheckBox
          id={`${one.id}-blended`}
          label="The energy rate is blended"
          hint="A bill’s total over its kWh, demand included: it overstates the saving where the peak is not cut."
          className="col-span-2 sm:col-span-3"
          checked={one.data.blended}
          onChange={(event) => set({ blended: event.target.checked })}
        />
      </div>
      <Bills one={one} survey={survey} />
      <NotesField label="Notes" value={one.data.notes} onSave={(notes) => set({ notes })} />
      <div>
        <Button look="danger" onClick={() => survey.archive('utility-accounts', one)}>
          Take out<span className="sr-only"> {one.data.utility}</span>
        </Button>
      </div>
    </div>
  );
}

export function Utility({ survey }: { survey: Survey }) {
  const add = () =>
    survey.add('utility-accounts', crypto.randomUUID(), {
      utility: 'Electricity',
      accountNumber: '',
      rateSchedule: '',
      energyRate: null,
      blended: false,
      demandRate: null,
      bills: [],
      notes: '',
    } satisfies UtilityAccount);
  return (
    <Sheet title="Utility">
      <div className="flex flex-col gap-4">
        {survey.accounts.map((one) => (
          <Account key={one.id} one={one} survey={survey} />
        ))}
      </div>
      <Button look="secondary" className="mt-4" onClick={add}>
        Add an account
      </Button>
    </Sheet>
  );
}
