import type { Device } from '../../../../../server/src/contract/account.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { Button } from '../../../components/button.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { type Column, DataTable } from '../../../components/data-table.tsx';
import { toast } from '../../../components/toasts.tsx';
import { Moment } from '../../../components/moment.tsx';
import { formatDay } from '../../../lib/moments.ts';
import { useDevices } from '../api/list-devices.ts';
import { useSignOutDevice } from '../api/sign-out-device.ts';
import { useSignOutEverywhere } from '../api/sign-out-everywhere.ts';
import { deviceWords } from '../model/device-words.ts';

const columns: Column<Device>[] = [
  {
    id: 'device',
    head: 'Device',
    isName: true,
    cell: ({ userAgent, isThisOne }) => (
      <>
        {deviceWords(userAgent)}
        {isThisOne && <span className="ml-[8px] font-[400] text-ink3">this one</span>}
      </>
    ),
  },
  { id: 'used', head: 'Last used', cell: ({ lastUsedAt }) => <Moment at={lastUsedAt} /> },
  { id: 'since', head: 'Signed in', cell: ({ signedInAt }) => formatDay(signedInAt) },
  {
    id: 'act',
    head: 'Actions',
    isHeadUnseen: true,
    isRight: true,
    cell: (device) => <SignOutDevice device={device} />,
  },
];

/** Where the account is signed in. */
export function DevicesPart() {
  const query = useDevices();
  return (
    <section className="page-part" aria-labelledby="part-devices">
      <h2 id="part-devices">Devices</h2>
      <p className="my-[8px] text-ink2">Each stays signed in for 30 days after it was last used.</p>
      <AsyncView query={query} loading="Reading the devices">
        {({ items }) => <DataTable label="Devices" columns={columns} rows={items} rowId={({ id }) => id} />}
      </AsyncView>
      <div className="mt-[16px]">
        <SignOutEverywhere />
      </div>
    </section>
  );
}

function SignOutDevice({ device: { id, userAgent, isThisOne } }: { device: Device }) {
  const signOut = useSignOutDevice();
  if (isThisOne) return null;
  const name = deviceWords(userAgent);
  return (
    <button
      className="lnk"
      disabled={signOut.isPending}
      aria-label={`Sign out ${name}`}
      onClick={() =>
        signOut.mutate(id, {
          onSuccess: () => toast(`${name} is signed out.`),
          onError: ({ message }) => toast(`${name} is still signed in. ${message}`, { kind: 'stop' }),
        })
      }
    >
      {signOut.isPending ? 'Signing out' : 'Sign out'}
    </button>
  );
}

function SignOutEverywhere() {
  const signOut = useSignOutEverywhere();
  return (
    <ConfirmDialog
      title="Sign out everywhere"
      about="Every device is signed out, this one too."
      trigger={<Button>Sign out everywhere</Button>}
      confirm="Sign out everywhere"
      busy="Signing out"
      onConfirm={async () => {
        await signOut.mutateAsync();
        // Loaded anew, so that nothing of the person stays in the page's memory.
        window.location.assign('/sign-in');
      }}
    />
  );
}
