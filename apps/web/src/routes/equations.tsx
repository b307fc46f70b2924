export { EquationsPlace as Component } from '../features/equations/components/equations-place.tsx';
