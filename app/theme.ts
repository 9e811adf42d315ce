import type { Theme } from '@/components/ui/theme-switch';

/** The theme that the visitor chose, from a cookie. */
export function readTheme(cookies: { get(name: string): { value: string } | undefined }): Theme {
  const value = cookies.get('theme')?.value;
  return value === 'light' || value === 'dark' ? value : 'system';
}
