import { may, roles } from '#shared/show/roles';
import { actWords, roleWords } from './roleWords';

/** What each role may do, read from the table that every request is checked against. */
export const RoleTable = () => (
  // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keys
  <section tabIndex={0} aria-label="What each role may do" className="overflow-x-auto">
    <table className="w-full min-w-120 text-left">
      <caption className="sr-only">What each role may do</caption>
      <thead>
        <tr className="align-bottom">
          <th scope="col" className="py-2 pr-3 font-normal text-(--quiet)">
            May
          </th>
          {roles.map((role) => (
            <th key={role} scope="col" className="px-3 py-2">
              {role}
              <span className="block text-sm font-normal text-(--quiet)">{roleWords[role]}</span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {actWords.map(({ act, action }) => (
          <tr key={action} className="border-t border-(--line)">
            <th scope="row" className="py-2 pr-3 font-normal">
              {act}
            </th>
            {roles.map((role) => (
              <td key={role} className="px-3 py-2">
                {may(role, action) ? '✓ yes' : <span className="text-(--quiet)">no</span>}
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  </section>
);
