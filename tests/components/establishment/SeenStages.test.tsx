import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { SeenStages } from '@/components/establishment/SeenStages';
import type { EstablishmentResponse } from '@/shared/contracts/proposals';
import { screenYard } from '../../factories/screenYard';
import { answerRequests, renderPart } from '../../setup/screenServer';

const sent = answerRequests(() => ({ done: true }));
beforeEach(() => {
  sent.length = 0;
});
const yard = screenYard();
const zoneId = yard.zones[0]?.id ?? '';
const seed: EstablishmentResponse = {
  zoneId, zoneName: 'Front lawn', seededOn: '2026-06-04', grass: 'cool_mix', dayNumber: 9, stage: 'sown', stageRange: { emergenceFromOn: null, emergenceToOn: null }, schedule: { stages: [] },
  scheduleIsDefault: true, days: [], openProposal: null, seen: [{ on: '2026-06-12', stage: 'coming_up', person: { id: zoneId, name: 'Robin' } }], stageFrom: 'heat',
};

describe('what people see of a sowing', () => {
  it('is chosen by its signs and sent for its day; nothing is sent before something is chosen', async () => {
    const person = userEvent.setup();
    renderPart(<SeenStages yard={yard} seed={seed} todayOn="2026-06-13" />);
    await person.click(screen.getByRole('button', { name: 'Write down what I see' }));
    expect(await screen.findByText('Say what you see.')).toBeTruthy();
    await person.click(screen.getByLabelText(/^Rooting/));
    await person.click(screen.getByRole('button', { name: 'Write down what I see' }));
    await waitFor(() => expect(sent).toEqual([{ method: 'PUT', path: `/yards/${yard.id}/zones/${zoneId}/seen-stages/2026-06-13`, body: { stage: 'rooting' } }]));
  });

  it('is listed with who saw it, and taken out', async () => {
    const person = userEvent.setup();
    renderPart(<SeenStages yard={yard} seed={seed} todayOn="2026-06-13" />);
    expect(screen.getByText('Fri 12 Jun: coming up, seen by Robin')).toBeTruthy();
    await person.click(screen.getByRole('button', { name: /^Take out/ }));
    await waitFor(() => expect(sent.map((each) => [each.method, each.path])).toEqual([['DELETE', `/yards/${yard.id}/zones/${zoneId}/seen-stages/2026-06-12`]]));
  });

  it('waits for the day of sowing', () => {
    expect(renderPart(<SeenStages yard={yard} seed={{ ...seed, dayNumber: -2 }} todayOn="2026-06-02" />).container.textContent).toBe('');
  });
});
