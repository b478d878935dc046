import { useQueryClient } from '@tanstack/react-query';
import { createContext, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import type { Me } from '../../shared/wire/session';
import type { Role } from '../../shared/words';
import { api } from './client';

interface SessionState {
  /** undefined: not known yet */
  me: Me | null | undefined;
  production: { id: string; name: string; role: Role | 'administrator' } | null;
  choose: (productionId: string) => void;
  signIn: (email: string, password: string) => Promise<void>;
  signOut: () => Promise<void>;
}

const KEY = 'lollop.production';
const SessionContext = createContext<SessionState | null>(null);

/** Who is here, and in which production. */
export function SessionProvider({ children }: { children: ReactNode }) {
  const queries = useQueryClient();
  const [me, setMe] = useState<Me | null | undefined>(undefined);
  const [chosen, setChosen] = useState<string | null>(readChoice);
  useEffect(() => {
    api.onSignedOut = () => setMe(null);
    api.renew().then(
      (session) => setMe(session?.me ?? null),
      () => setMe(null),
    );
  }, []);
  const value = useMemo<SessionState>(() => {
    const memberships = me?.memberships ?? [];
    const membership = memberships.find((m) => m.production.id === chosen) ?? memberships[0];
    return {
      me,
      production: membership
        ? { ...membership.production, role: me?.administrator ? 'administrator' : membership.role }
        : null,
      choose: (id) => {
        setChosen(id);
        try {
          localStorage.setItem(KEY, id);
        } catch {
          // Without storage the choice lasts as long as the page.
        }
      },
      signIn: async (email, password) => {
        const session = await api.signIn(email, password);
        queries.clear();
        setMe(session.me);
      },
      signOut: async () => {
        await api.signOut();
        queries.clear();
        setMe(null);
      },
    };
  }, [me, chosen, queries]);
  return <SessionContext.Provider value={value}>{children}</SessionContext.Provider>;
}

function readChoice(): string | null {
  try {
    return localStorage.getItem(KEY);
  } catch {
    return null;
  }
}

export function useSession(): SessionState {
  const session = useContext(SessionContext);
  if (!session) throw new Error('useSession needs a SessionProvider above it.');
  return session;
}

const RANK = { artist: 0, 'technical-director': 1, lead: 2, administrator: 3 } as const;

/** Whether the person may do what this role may. The server decides; this is for the buttons. */
export function useMay(least: Role): boolean {
  const { production } = useSession();
  return production !== null && RANK[production.role] >= RANK[least];
}
