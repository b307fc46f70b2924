import { readSchedule } from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import { readSchedule as readScheduleFile } from './schedule-service.ts';

export function registerSchedule({ mount }: Frame): void {
  mount(readSchedule, ({ upload }) => readScheduleFile(upload));
}
