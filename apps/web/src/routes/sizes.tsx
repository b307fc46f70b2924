export { SizesPlace as Component } from '../features/sizing/components/sizes-place.tsx';
