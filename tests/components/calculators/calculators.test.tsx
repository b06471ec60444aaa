import { configure, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import AllCalculators from '@/components/calculators/AllCalculators';
import type { CalculatorName } from '@/components/calculators/calculatorName';

jest.setTimeout(60_000);
configure({ asyncUtilTimeout: 15_000 });

const headlines: Record<CalculatorName, RegExp> = {
  'move-distance': /^Move \d+ ft: \d+ positions\.$/, 'hose-and-bucket': /gpm now, .* gpm through the other hose/, 'soil-store': /runs? of|One set of/, 'water-balance': /^(Reaches its refill line on|Not short before)/,
  seedbed: /^(Too dry from|The doses keep it moist)/, 'sun-exposure': /hours of sun in June/, 'reference-et': /of water from short, well-watered grass/,
};
const answer = () => screen.getByRole('status').textContent ?? '';

beforeEach(() => {
  window.sessionStorage.clear();
  window.localStorage.setItem('dapple.units', 'us');
});

describe('a calculator without an account', () => {
  it.each(Object.entries(headlines) as [CalculatorName, RegExp][])('%s answers its example in words, with a table beside the drawing', (name, headline) => {
    render(<AllCalculators name={name} />);
    expect(screen.getByRole('heading', { level: 1 })).toBeTruthy();
    expect(answer()).toMatch(headline);
    expect(screen.getByText('An example')).toBeTruthy();
    expect(document.querySelectorAll('table, ul[aria-label]').length).toBeGreaterThan(0);
    expect(document.body.textContent).not.toMatch(/NaN|undefined|Infinity/);
  });

  it('follows what is typed, and keeps it when the page is opened again', async () => {
    const person = userEvent.setup();
    const { unmount } = render(<AllCalculators name="hose-and-bucket" />);
    const seconds = screen.getByLabelText('Full after');
    await person.clear(seconds);
    await person.type(seconds, '30');
    // 5 gal in 30 s is 10 gpm (University of Idaho).
    expect(answer()).toMatch(/^10(\.0)? gpm now/);
    expect(screen.queryByText('An example')).toBeNull();
    unmount();
    render(<AllCalculators name="hose-and-bucket" />);
    expect(answer()).toMatch(/^10(\.0)? gpm now/);
  });

  it('turns everything into metric with one press', async () => {
    const person = userEvent.setup();
    render(<AllCalculators name="water-balance" />);
    expect(document.body.textContent).toMatch(/\d in/);
    await person.click(screen.getByRole('radio', { name: 'Metric' }));
    const figures = within(document.querySelector('.k-answer') as HTMLElement);
    expect(figures.getAllByText(/mm/).length).toBeGreaterThan(0);
    expect(document.querySelector('.k-answer')?.textContent).not.toMatch(/\d in\b/);
  });

  it('says what is wrong at the field and gives no answer until it is right', async () => {
    const person = userEvent.setup();
    render(<AllCalculators name="reference-et" />);
    const low = screen.getByLabelText('Lowest temperature');
    await person.clear(low);
    await person.type(low, 'cold');
    await person.tab();
    expect(screen.getByText(/Write a number/)).toBeTruthy();
    expect(screen.getByText(/Put right what is marked/)).toBeTruthy();
    await person.clear(low);
    await person.type(low, '99');
    expect(screen.getByText('The lowest temperature cannot lie above the highest.')).toBeTruthy();
  });

  it('names what cannot be together', async () => {
    const person = userEvent.setup();
    render(<AllCalculators name="hose-and-bucket" />);
    const length = screen.getAllByLabelText('Hose length')[0] as HTMLElement;
    await person.clear(length);
    await person.type(length, '900');
    await person.clear(screen.getByLabelText('Full after'));
    await person.type(screen.getByLabelText('Full after'), '15');
    expect(screen.getByText(/That much water cannot come through that hose/)).toBeTruthy();
  });

  it('asks for what the sprinkler needs and nothing else', async () => {
    const person = userEvent.setup();
    render(<AllCalculators name="move-distance" />);
    expect(screen.queryByLabelText('Width across the sweep')).toBeNull();
    await person.selectOptions(screen.getByLabelText('The sprinkler'), 'oscillating');
    expect(await screen.findByLabelText('Width across the sweep')).toBeTruthy();
    await person.selectOptions(screen.getByLabelText('The sprinkler'), 'travelling');
    expect(await screen.findByLabelText('Way in an hour')).toBeTruthy();
    expect(answer()).toMatch(/track/);
  });
});
