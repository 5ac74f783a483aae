import { Link, NavLink, Outlet, ScrollRestoration } from 'react-router-dom';
import { Mark } from '../components/mark.tsx';
import { DisplayMenu } from './display-menu.tsx';

/** The head every page stands under. */
export function Layout() {
  return (
    <>
      <a className="btn skip" href="#main">
        To the content
      </a>
      <header className="top">
        <Link className="brand" to="/">
          <Mark />
          <span>Voltiplano</span>
        </Link>
        <nav aria-label="Main">
          <NavLink to="/try">Session desk</NavLink>
          <NavLink to="/model">The model</NavLink>
          <NavLink to="/schema">Schema</NavLink>
        </nav>
        <div className="top-right">
          <DisplayMenu />
        </div>
      </header>
      <main id="main" tabIndex={-1} className="outline-none">
        <Outlet />
      </main>
      <ScrollRestoration />
    </>
  );
}
