import { createContext, useContext, useLayoutEffect, useMemo, useState, type ReactNode } from 'react';
import { useColorScheme } from 'react-native';
import { DAY, NIGHT, type Palette } from './palette';

export type ThemeChoice = 'system' | 'day' | 'night';

interface Theme {
  scheme: 'day' | 'night';
  colors: Palette;
  choice: ThemeChoice;
  choose: (choice: ThemeChoice) => void;
}

const KEY = 'lollop.theme';
const ThemeContext = createContext<Theme | null>(null);

function stored(): ThemeChoice {
  try {
    const value = localStorage.getItem(KEY);
    return value === 'day' || value === 'night' ? value : 'system';
  } catch {
    return 'system';
  }
}

/** Day or night: the system's choice unless the person made one. */
export function ThemeProvider({ children }: { children: ReactNode }) {
  const system = useColorScheme() === 'dark' ? 'night' : 'day';
  const [choice, setChoice] = useState<ThemeChoice>(stored);
  const scheme = choice === 'system' ? system : choice;
  useLayoutEffect(() => paintDocument(scheme), [scheme]);
  const value = useMemo<Theme>(
    () => ({
      scheme,
      colors: scheme === 'night' ? NIGHT : DAY,
      choice,
      choose: (next) => {
        setChoice(next);
        try {
          localStorage.setItem(KEY, next);
        } catch {
          // Storage may be closed to the page; the choice then lasts as long as the page does.
        }
      },
    }),
    [scheme, choice],
  );
  return <ThemeContext.Provider value={value}>{children}</ThemeContext.Provider>;
}

/** What lies behind the screens, and the browser's own parts, follow the chosen theme and not only the system. */
function paintDocument(scheme: Theme['scheme']): void {
  const { style } = document.documentElement;
  const colors = scheme === 'night' ? NIGHT : DAY;
  style.setProperty('--ink', colors.ink);
  style.colorScheme = scheme === 'night' ? 'dark' : 'light';
  style.backgroundColor = colors.page;
  document.body.style.backgroundColor = colors.page;
}

export function useTheme(): Theme {
  return useContext(ThemeContext) ?? { scheme: 'day', colors: DAY, choice: 'system', choose: () => undefined };
}
