import { Segmented } from './segmented.tsx';
import { useTheme } from './theme.ts';

/** Light, dark, or as the system has it. */
export function ThemeSwitch({ wide = false }: { wide?: boolean }) {
  const [theme, setTheme] = useTheme();
  return (
    <Segmented
      label="Light or dark"
      value={theme}
      onValue={setTheme}
      wide={wide}
      choices={[
        { value: 'system', label: 'System' },
        { value: 'light', label: 'Light' },
        { value: 'dark', label: 'Dark' },
      ]}
    />
  );
}
