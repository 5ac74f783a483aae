import { Caution } from '../../components/caution.tsx';

export function LandingPage() {
  return (
    <section className="p-[24px]">
      <h1>Know the charge curve before you plug in.</h1>
      <Caution invented />
    </section>
  );
}
