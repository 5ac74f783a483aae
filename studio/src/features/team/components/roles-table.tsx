import { type Capability, roleMay, roles } from '../../../../../server/src/contract/roles.ts';

const deeds: { what: string; capability: Capability }[] = [
  { what: 'Read the workspace, comment, export', capability: 'read' },
  { what: 'Create and edit studies, upload logs, run', capability: 'edit-studies' },
  { what: 'Edit the library, release others’ studies, make links', capability: 'edit-library' },
  { what: 'Invite, change roles and settings, delete the workspace', capability: 'manage' },
];

/** Deeds against roles, from the same rule that the server keeps. */
export function RolesTable() {
  return (
    <div className="sheet-table">
      <table>
        <thead>
          <tr>
            <th scope="col">May</th>
            {roles.map((role) => (
              <th key={role} scope="col">
                {role}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {deeds.map(({ what, capability }) => (
            <tr key={capability}>
              <th scope="row">{what}</th>
              {roles.map((role) => (
                <td key={role}>{roleMay(role, capability) ? 'yes' : <span className="text-ink3">no</span>}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
