export { SchedulePlace as Component } from '../features/schedule/components/schedule-place.tsx';
