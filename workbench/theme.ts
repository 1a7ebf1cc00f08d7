/** Colours: light or dark as the system asks or as the person switches, for the page, the grid and the pane together. */
import { defaultTheme, type Theme } from '@univerjs/themes';

export type Choice = 'system' | 'light' | 'dark';

/** The grid's accent: the pine green of workbench.css as a ramp, so that selection and headers belong to the same page. */
export const gridTheme: Theme = {
  ...defaultTheme,
  primary: {
    50: '#f1f6f6',
    100: '#dfebea',
    200: '#c1d8d6',
    300: '#9bbfbd',
    400: '#5f9594',
    500: '#3f7c7b',
    600: '#2c6665',
    700: '#215251',
    800: '#1b4342',
    900: '#153534',
  },
};

const STORED = 'spanrow-workbench-colours';

export interface ThemeSwitch {
  readonly choice: Choice;
  readonly dark: boolean;
  choose(choice: Choice): void;
  onChange(listener: (dark: boolean) => void): () => void;
}

export function createThemeSwitch(): ThemeSwitch {
  const system = matchMedia('(prefers-color-scheme: dark)');
  const listeners = new Set<(dark: boolean) => void>();
  let choice = readStored();
  let dark = isDark();

  function isDark(): boolean {
    return choice === 'dark' || (choice === 'system' && system.matches);
  }
  function apply(): void {
    const next = isDark();
    document.documentElement.dataset.theme = next ? 'dark' : 'light';
    if (next === dark) return;
    dark = next;
    for (const listener of listeners) listener(dark);
  }
  system.addEventListener('change', apply);
  apply();

  return {
    get choice() {
      return choice;
    },
    get dark() {
      return dark;
    },
    choose(next) {
      choice = next;
      try {
        localStorage.setItem(STORED, next);
      } catch {
        // a browser may refuse storage; the choice then lasts as long as the page
      }
      apply();
    },
    onChange(listener) {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
  };
}

function readStored(): Choice {
  try {
    const stored = localStorage.getItem(STORED);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
}
