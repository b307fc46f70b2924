import { NOTICES } from '@farlug/contract/notices';
import { useParams } from 'react-router-dom';
import { TablesPart } from '../features/firm/components/tables-part.tsx';
import { AboutPage } from '../features/front/components/about-page.tsx';
import { Method } from '../features/front/components/method.tsx';

export function Component() {
  const { part } = useParams();
  switch (part) {
    case 'tables':
      return (
        <AboutPage title="Tables and editions">
          <div className="desk:mx-8">
            <TablesPart />
          </div>
        </AboutPage>
      );
    case 'limits':
      return (
        <AboutPage title="Limits of use">
          <ul className="mx-4 max-w-240 border-t border-ink desk:mx-12">
            {NOTICES.map((notice) => (
              <li key={notice} className="border-b border-rule py-3 text-pretty">
                {notice}
              </li>
            ))}
          </ul>
        </AboutPage>
      );
    default:
      return (
        <AboutPage title="Method">
          <Method />
        </AboutPage>
      );
  }
}
