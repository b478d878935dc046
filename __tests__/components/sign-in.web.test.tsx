import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { SessionProvider } from '../../components/api/session';
import { SignInScreen } from '../../components/people/sign-in-screen';

const answer = (status: number, body: unknown) =>
  ({ ok: status < 300, status, json: () => Promise.resolve(body), headers: new Map() }) as unknown as Response;

/** Nobody is signed in; the sign-in itself is answered as told. */
async function open(signIn: { status: number; body: unknown }): Promise<jest.Mock> {
  const calls = jest.fn((path: string) =>
    Promise.resolve(
      path === '/api/session'
        ? answer(signIn.status, signIn.body)
        : answer(401, { type: 'about:blank', title: 'No session', status: 401 }),
    ),
  );
  global.fetch = calls as unknown as typeof fetch;
  // The session is asked for as the page opens; wait until it is known that there is none.
  await act(async () => {
    render(
      <QueryClientProvider client={new QueryClient()}>
        <SessionProvider>
          <SignInScreen />
        </SessionProvider>
      </QueryClientProvider>,
    );
  });
  return calls;
}

const email = () => screen.getByRole('textbox', { name: 'E-mail' });
const password = () => screen.getByLabelText('Password');
const send = () => fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));

it('asks for what is missing before anything is sent', async () => {
  const calls = await open({ status: 201, body: null });
  send();
  await waitFor(() => expect(screen.getByText('Give your e-mail address.')).toBeTruthy());
  expect(screen.getByText('Give your password.')).toBeTruthy();
  expect(email().getAttribute('aria-invalid')).toBe('true');
  expect(calls.mock.calls.filter(([path]) => path === '/api/session')).toHaveLength(0);
});

it('says once that the two do not belong together, at neither field', async () => {
  const detail = 'E-mail and password do not belong together.';
  await open({ status: 401, body: { type: '/problems/sign-in', title: 'Not signed in', status: 401, detail } });
  fireEvent.change(email(), { target: { value: 'joss@gannet.example' } });
  fireEvent.change(password(), { target: { value: 'not it' } });
  send();
  await waitFor(() => expect(screen.getByRole('alert').textContent).toBe(detail));
  expect(email().getAttribute('aria-invalid')).toBe('false');
  expect(password().getAttribute('aria-invalid')).toBe('false');
});

it('puts a fault the server found at its field', async () => {
  await open({
    status: 400,
    body: {
      type: '/problems/invalid-request',
      title: 'Invalid',
      status: 400,
      detail: 'Something is missing.',
      errors: [{ pointer: '/email', detail: 'No address ends like this.' }],
    },
  });
  fireEvent.change(email(), { target: { value: 'joss@gannet.example' } });
  fireEvent.change(password(), { target: { value: 'bell-buoy' } });
  send();
  await waitFor(() => expect(screen.getByRole('alert').textContent).toBe('No address ends like this.'));
  expect(email().getAttribute('aria-invalid')).toBe('true');
});

it('shows and hides the password', async () => {
  await open({ status: 201, body: null });
  expect(password().getAttribute('type')).toBe('password');
  fireEvent.click(screen.getByRole('button', { name: 'Show' }));
  expect(password().getAttribute('type')).not.toBe('password');
});
