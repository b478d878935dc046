import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { Stack } from 'expo-router';
import { useState } from 'react';
import { ApiProblem } from '../components/api/problem';
import { SessionProvider } from '../components/api/session';
import { ThemeProvider } from '../components/theme/use-theme';

const retry = (failures: number, error: Error) => !(error instanceof ApiProblem && error.status >= 400) && failures < 2;

// Providers from the outside in: server data, who is here, how it looks.
export default function RootLayout() {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { retry } } }));
  return (
    <QueryClientProvider client={client}>
      <SessionProvider>
        <ThemeProvider>
          <Stack screenOptions={{ headerShown: false, title: 'Lollop' }} />
        </ThemeProvider>
      </SessionProvider>
    </QueryClientProvider>
  );
}
