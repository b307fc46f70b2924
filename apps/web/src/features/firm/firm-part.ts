import type { FirmView, presetView } from '@farlug/contract/routes';
import type { ReactNode } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../lib/api-error.ts';
import type { FirmActions } from './hooks/use-firm-actions.ts';

export type Preset = z.output<typeof presetView>;
export type EditPreset = (props: {
  preset: Preset | null;
  onClose: () => void;
  save: (body: Omit<Preset, 'id'>) => Promise<ApiError | null>;
}) => ReactNode;

export interface FirmPartProps {
  firm: FirmView;
  actions: FirmActions;
  /** Everyone sees how the firm is set; an administrator changes it. */
  mayManage: boolean;
}
