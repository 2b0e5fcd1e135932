import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { MemoryRouter, Route, Routes } from 'react-router-dom';
import { afterAll, afterEach, beforeAll, beforeEach, expect, it } from 'vitest';
import { SignInPage } from './sign-in-page.tsx';

/** A server on a real port that answers what the test says: the page's own way to it is what is tried. */
let server: Server;
let answer: { status: number; body: unknown };
let sent: unknown[] = [];

beforeAll(async () => {
  server = createServer((request, response) => {
    let text = '';
    request.on('data', (piece: Buffer) => (text += piece.toString()));
    request.on('end', () => {
      sent.push(JSON.parse(text));
      response.writeHead(answer.status, { 'content-type': 'application/json' }).end(JSON.stringify(answer.body));
    });
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
});
beforeEach(() => {
  sent = [];
  window.location.href = `http://127.0.0.1:${(server.address() as AddressInfo).port}/sign-in`;
});
afterEach(cleanup);
afterAll(() => server.close());

function open(address = '/sign-in'): void {
  render(
    <QueryClientProvider client={new QueryClient()}>
      <MemoryRouter initialEntries={[address]}>
        <Routes>
          <Route path="/sign-in" element={<SignInPage />} />
          <Route path="*" element={<p data-testid="arrived" />} />
        </Routes>
      </MemoryRouter>
    </QueryClientProvider>,
  );
}

const type = (label: string, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } });
const press = () => fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
const refusal = (status: number, code: string, more: object = {}) => ({ status, body: { status, code, params: {}, errors: [], ...more } });

it('says beside each field what is missing, and sends nothing', async () => {
  open();
  press();
  const email = await screen.findByLabelText('Email address');
  await screen.findAllByText('This is needed.');
  expect(email.getAttribute('aria-invalid')).toBe('true');
  expect(document.getElementById(email.getAttribute('aria-describedby') ?? '')?.textContent).toBe('This is needed.');
  type('Email address', 'not an address');
  expect(await screen.findByText('This is not in the form asked for.')).toBeTruthy();
  expect(sent).toEqual([]);
});

it('signs in and goes where one wanted to be', async () => {
  answer = { status: 200, body: { kind: 'user', id: '', name: '', email: '', centres: [] } };
  open('/sign-in?next=%2Fnorth%2Fcalls');
  type('Email address', ' Ada@House.test ');
  type('Password', 'wood ink film');
  press();
  expect(await screen.findByTestId('arrived')).toBeTruthy();
  expect(sent).toEqual([{ email: 'ada@house.test', password: 'wood ink film' }]);
});

it('empties the password alone when the two do not fit together', async () => {
  answer = refusal(401, 'session.wrong');
  open();
  type('Email address', 'ada@house.test');
  type('Password', 'wrong one');
  press();
  expect(await screen.findByText('Email address and password don’t fit together.')).toBeTruthy();
  expect(screen.getByLabelText<HTMLInputElement>('Password').value).toBe('');
  expect(screen.getByLabelText<HTMLInputElement>('Email address').value).toBe('ada@house.test');
});

it('says how long to wait after too many tries', async () => {
  answer = refusal(429, 'session.too-many-tries', { params: { retryAfterS: 600 } });
  open();
  type('Email address', 'ada@house.test');
  type('Password', 'wrong one');
  press();
  expect(await screen.findByText('Too many wrong tries. Try again in 10 minutes.')).toBeTruthy();
});

it('says why a display link didn’t open', () => {
  open('/sign-in?because=display.unknown');
  expect(screen.getByRole('status').textContent).toContain('display link');
});
