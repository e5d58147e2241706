import { Monitor, Moon, Sun } from 'lucide-react';
import { chooseTheme, useThemeChoice } from '#src/lib/theme.ts';
import { Segmented } from './segmented.tsx';

const CHOICES = [
  {
    value: 'system',
    label: 'As the system',
    icon: <Monitor aria-hidden="true" className="size-4" />,
  },
  { value: 'light', label: 'Light', icon: <Sun aria-hidden="true" className="size-4" /> },
  { value: 'dark', label: 'Dark', icon: <Moon aria-hidden="true" className="size-4" /> },
] as const;

export function ThemeSwitch({ iconsOnly = false }: { iconsOnly?: boolean }) {
  const choice = useThemeChoice();
  return (
    <Segmented
      label="Theme"
      value={choice}
      choices={CHOICES}
      onChange={chooseTheme}
      iconsOnly={iconsOnly}
    />
  );
}
