import { fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { CheckSoil } from '@/components/budget/CheckSoil';
import type { ObservationResponse } from '@/shared/contracts/ground';
import { screenYard, screenZone } from '../../factories/screenYard';
import { answerRequests, renderPart } from '../../setup/screenServer';

const today = '2026-06-13';
const sent = answerRequests(({ body }) => (JSON.stringify(body)?.includes('hard') ? null : { done: true }));
beforeEach(() => {
  sent.length = 0;
});

const back = screenZone({ id: '00000000-0000-4000-8000-000000000012', name: 'Back lawn' });
const yard = screenYard({ zones: [screenZone(), back] });
const show = (observations: ObservationResponse[] = [], of = yard) => renderPart(<CheckSoil yard={of} today={today} observations={observations} />);

describe('checking the soil', () => {
  it('sends how far the screwdriver went in, for the zone and the morning chosen', async () => {
    const person = userEvent.setup();
    show();
    await person.selectOptions(screen.getByLabelText('Zone'), 'Back lawn');
    fireEvent.change(screen.getByLabelText('Morning of'), { target: { value: '2026-06-12' } });
    await person.click(screen.getByRole('button', { name: 'Write down what you found' }));
    expect(await screen.findByText('Say how it went in.')).toBeTruthy();
    expect(sent).toEqual([]);
    await person.click(screen.getByLabelText('Easily'));
    await person.click(screen.getByRole('button', { name: 'Write down what you found' }));
    await waitFor(() => expect(sent).toEqual([{ method: 'PUT', path: `/yards/${yard.id}/zones/${back.id}/observations/2026-06-12`, body: { kind: 'screwdriver', feel: 'easy' } }]));
  });

  it('takes a probe in percent and sends a share; what no soil holds stays here', async () => {
    const person = userEvent.setup();
    show();
    await person.click(screen.getByLabelText('A probe'));
    const percent = await screen.findByLabelText('Water by volume');
    await person.type(percent, '85');
    await person.click(screen.getByRole('button', { name: 'Write down what you found' }));
    expect(await screen.findByText('Write a number from 0 to 60.')).toBeTruthy();
    await person.clear(percent);
    await person.type(percent, '18');
    await person.click(screen.getByRole('button', { name: 'Write down what you found' }));
    await waitFor(() => expect(sent.map((each) => each.body)).toEqual([{ kind: 'probe', waterContent: 0.18 }]));
  });

  it('keeps what was chosen when the service refuses', async () => {
    const person = userEvent.setup();
    show();
    await person.click(screen.getByLabelText('Not at all, or hardly'));
    await person.click(screen.getByRole('button', { name: 'Write down what you found' }));
    expect((await screen.findAllByText('That day has not come yet.')).length).toBeGreaterThan(0);
    expect(screen.getByLabelText<HTMLInputElement>('Not at all, or hardly').checked).toBe(true);
  });

  it('lists what was found with its weight, and takes it out', async () => {
    const person = userEvent.setup();
    show([{ zoneId: back.id, on: '2026-06-10', kind: 'screwdriver', feel: 'firm', waterContent: null, weight: 0.4, person: null }]);
    expect(screen.getByText(/Back lawn, Wed 10 Jun: screwdriver went in hard; counts for 40 %/)).toBeTruthy();
    await person.click(screen.getByRole('button', { name: /^Take out the check of Back lawn/ }));
    await waitFor(() => expect(sent).toEqual([{ method: 'DELETE', path: `/yards/${yard.id}/zones/${back.id}/observations/2026-06-10`, body: undefined }]));
  });

  it('is not there for somebody who may not record, or where no zone is', () => {
    expect(show([], screenYard({ abilities: { ...yard.abilities, 'tests.record': false } })).container.textContent).toBe('');
    expect(show([], screenYard({ zones: [] })).container.textContent).toBe('');
  });
});
