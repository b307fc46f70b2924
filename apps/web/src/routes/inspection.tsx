export { InspectionPage as Component } from '../features/inspection/components/inspection-page.tsx';
