import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { ReactElement } from 'react';
import { PermitDialog } from '@/components/yard/PermitDialog';
import { PositionDialog } from '@/components/yard/PositionDialog';
import { RuleDialog } from '@/components/yard/RuleDialog';
import { SettingsForm } from '@/components/yard/SettingsForm';
import type { PermitResponse, WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { exampleYard, frontZoneId, positionId, ruleId, seedZoneId } from '../../factories/yardResponse';

// Toasts come in a chunk of their own, which the test runner cannot load.
jest.mock('@/components/ui/Toast', () => ({ showToast: () => Promise.resolve() }));

jest.setTimeout(60_000);

interface Sent { method: string; path: string; body: Record<string, unknown> }

const realFetch = globalThis.fetch;
let sent: Sent[];
beforeEach(() => {
  sent = [];
  // The network is the border here: what would go to the server is kept, and answered as done.
  globalThis.fetch = (input, init) => {
    sent.push({ method: init?.method ?? 'GET', path: String(input), body: JSON.parse(String(init?.body ?? '{}')) as Record<string, unknown> });
    return Promise.resolve({ ok: true, status: 200, json: () => Promise.resolve({}) } as Response);
  };
});
afterEach(() => {
  globalThis.fetch = realFetch;
});

function show(screenPart: (onClose: () => void) => ReactElement): { closed: () => boolean } {
  let closed = false;
  render(<QueryClientProvider client={new QueryClient()}>{screenPart(() => { closed = true; })}</QueryClientProvider>);
  return { closed: () => closed };
}
const box = (name: string) => screen.getByLabelText<HTMLInputElement>(name, { selector: 'input' });
const write = async (label: string, text: string) => {
  await userEvent.clear(screen.getByLabelText(label));
  await userEvent.click(screen.getByLabelText(label));
  await userEvent.paste(text);
};
const press = (name: string) => userEvent.click(screen.getByText(name, { selector: 'button *, button' }));

describe('the dialog of a water rule', () => {
  const open = (yard: YardResponse, rule: WaterRuleResponse | null = null) => show((onClose) => <RuleDialog yard={yard} rule={rule} onClose={onClose} />);

  it('sends the days of each digit, what it binds, its stage and its clauses', async () => {
    const { closed } = open(exampleYard());
    await write('Name', 'By number');
    await userEvent.selectOptions(screen.getByLabelText('House number'), 'yes');
    const monday = within(screen.getByRole('group', { name: /^Monday: houses ending in/ }));
    await userEvent.click(monday.getByRole('checkbox', { name: '0' }));
    await userEvent.click(monday.getByRole('checkbox', { name: '1' }));
    await userEvent.click(within(screen.getByRole('group', { name: /^Sunday: houses ending in/ })).getByRole('checkbox', { name: '1' }));
    await userEvent.click(box('A hose held in the hand'));
    await userEvent.click(box('No hose may run unattended'));
    await userEvent.click(box('Does not bind newly seeded ground'));
    await userEvent.selectOptions(screen.getByLabelText('It holds'), '2');
    await write('Where it is written', 'City code 14-2');
    await userEvent.type(screen.getByLabelText('Read on'), '2026-05-01');
    await press('Save the rule');
    await waitFor(() => expect(closed()).toBe(true));
    expect(sent).toEqual([{
      method: 'POST', path: '/api/yards/00000000-0000-4000-8000-000000000001/rules',
      body: {
        name: 'By number', weekdays: null, dateParity: null, windows: null, weekdaysByDigit: [[1], [1, 0], [], [], [], [], [], [], [], []], attended: true, devices: ['sprinkler', 'soaker'], stage: 2,
        exemptSeeded: true, seasonFrom: null, seasonTo: null, source: 'City code 14-2', sourceOn: '2026-05-01',
      },
    }]);
  });

  it('says at which stage the yard is, and asks for a limit, a device and a digit', async () => {
    open(exampleYard());
    expect(screen.getByText('The yard is at stage 0 (default). Its settings change that.')).toBeTruthy();
    await write('Name', 'Nothing');
    await write('Where it is written', 'a sign');
    await userEvent.type(screen.getByLabelText('Read on'), '2026-05-01');
    for (const device of ['Sprinklers', 'Soaker hoses', 'A hose held in the hand']) {
      await userEvent.click(box(device));
    }
    await press('Save the rule');
    expect((await screen.findAllByText(/^Choose the weekdays, the dates or the hours that the rule allows/)).length).toBeGreaterThan(0);
    expect(screen.getAllByText('Choose what the rule binds.').length).toBeGreaterThan(0);
    await userEvent.selectOptions(screen.getByLabelText('House number'), 'yes');
    await press('Save the rule');
    expect((await screen.findAllByText('Give a day to at least one digit.')).length).toBeGreaterThan(0);
    expect(sent).toEqual([]);
  });

  it('gives back every field of a rule that nobody touched', async () => {
    const { id, ...stored } = exampleYard().rules[0] as WaterRuleResponse;
    const { closed } = open(exampleYard(), { id, ...stored });
    await press('Save the rule');
    await waitFor(() => expect(closed()).toBe(true));
    expect(sent).toEqual([{ method: 'PATCH', path: `/api/yards/00000000-0000-4000-8000-000000000001/rules/${ruleId}`, body: stored }]);
  });
});

describe('the dialog of a permit', () => {
  const open = (permit: PermitResponse | null) => show((onClose) => <PermitDialog yard={exampleYard()} permit={permit} onClose={onClose} />);

  it('starts with the seeded zones and sends its last day, months and rules', async () => {
    const { closed } = open(null);
    expect([box('Back strip').checked, box('Front lawn').checked]).toEqual([true, false]);
    await write('Name', 'Permit 26-114');
    await userEvent.type(screen.getByLabelText('First day'), '2026-06-10');
    await userEvent.type(screen.getByLabelText('Last day'), '2026-06-01');
    await userEvent.click(box('Jul'));
    await userEvent.selectOptions(screen.getByLabelText('It lifts'), 'some');
    await write('Who gave it', 'Water office');
    await userEvent.type(screen.getByLabelText('Read on'), '2026-06-09');
    await press('Save the permit');
    expect((await screen.findAllByText('The last day must not come before the first.')).length).toBeGreaterThan(0);
    expect(screen.getAllByText('Choose the rules that it lifts.').length).toBeGreaterThan(0);
    await userEvent.clear(screen.getByLabelText('Last day'));
    await userEvent.type(screen.getByLabelText('Last day'), '2026-07-10');
    await userEvent.click(box('Odd dates and mornings'));
    await press('Save the permit');
    await waitFor(() => expect(closed()).toBe(true));
    expect(sent[0]?.body).toEqual({
      name: 'Permit 26-114', zoneIds: [seedZoneId], fromOn: '2026-06-10', toOn: '2026-07-10', blackoutMonths: [7], windows: null, liftsRuleIds: [ruleId], source: 'Water office', sourceOn: '2026-06-09',
    });
  });

  it('gives back every field of a permit that nobody touched', async () => {
    const { id, ...stored } = exampleYard().permits[0] as PermitResponse;
    const { closed } = open({ id, ...stored });
    await press('Save the permit');
    await waitFor(() => expect(closed()).toBe(true));
    expect(sent[0]?.body).toEqual(stored);
  });
});

describe('the dialog of a position', () => {
  it('asks for the limit of a drain field with its source, beside who decides, and sends it in millimetres', async () => {
    const yard = exampleYard();
    const { closed } = show((onClose) => <PositionDialog yard={yard} zoneId={frontZoneId} position={yard.positions[0] ?? null} onClose={onClose} />);
    await userEvent.click(box('Alternate sets'));
    await write('Height above the lowest position', '10');
    await userEvent.selectOptions(screen.getByLabelText('Ground that takes only so much'), 'drain_field');
    expect(screen.getByText(/The local health code and the septic installer decide/)).toBeTruthy();
    await press('Save the position');
    expect((await screen.findAllByText('Say who gave the limit, or where it is written.')).length).toBeGreaterThan(0);
    await write('At most in any seven days', '0.5');
    await write('Who says so', 'the installer');
    await press('Save the position');
    await waitFor(() => expect(closed()).toBe(true));
    expect(sent[0]).toMatchObject({ method: 'PATCH', path: `/api/yards/00000000-0000-4000-8000-000000000001/positions/${positionId}` });
    expect(sent[0]?.body).toMatchObject({ alternateSets: true, weeklyLimit: { over: 'drain_field', source: 'the installer' } });
    // 1 in is 25.4 mm, 1 ft is 0.3048 m
    expect((sent[0]?.body as { weeklyLimit: { depthMm: number } }).weeklyLimit.depthMm).toBeCloseTo(12.7, 6);
    expect((sent[0]?.body as { heightM: number }).heightM).toBeCloseTo(3.048, 6);
  });
});

describe('the settings', () => {
  it('take the digit, the stage and a well, and leave out what was typed for a well that is no more', async () => {
    show(() => <SettingsForm yard={exampleYard()} />);
    expect(screen.getByText('Default: none, until somebody hears of one.')).toBeTruthy();
    await userEvent.selectOptions(screen.getByLabelText('Last digit of the house number'), '0');
    await userEvent.selectOptions(screen.getByLabelText(/^Stage of water shortage/), '2');
    await userEvent.selectOptions(screen.getByLabelText('What limits the flow'), 'well');
    expect(screen.getByText(/a pump that draws air can be ruined/)).toBeTruthy();
    await press('Save the settings');
    expect((await screen.findAllByText(/^Write something from /)).length).toBeGreaterThan(0);
    expect(sent).toEqual([]);
    await write('Most at once', '5');
    await write('Rest between two draws', '30');
    await press('Save the settings');
    await waitFor(() => expect(sent).toHaveLength(1));
    expect(sent[0]?.body).toMatchObject({ addressDigit: 0, waterStage: 2, supply: { kind: 'well', restMinutes: 30, drawMinutesAtMost: null } });
    // 1 US gallon is 3.785411784 L
    expect((sent[0]?.body as { supply: { flowLpm: number } }).supply.flowLpm).toBeCloseTo(18.927, 3);
    await write('Rest between two draws', 'long');
    await userEvent.selectOptions(screen.getByLabelText('What limits the flow'), 'none');
    await press('Save the settings');
    await waitFor(() => expect(sent).toHaveLength(2));
    expect(sent[1]?.body).toMatchObject({ supply: null });
  });
});
