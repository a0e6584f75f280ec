import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import type { Role } from '@shared/permission/can';
import { hasRole, signedIn } from './guards';

describe('guards', () => {
  let router: Router;
  const session = (role: Role | null) => ({
    user: role && {
      id: 'u',
      email: '',
      name: 'Tamsin',
      role,
      creditLine: '',
      defaultLicence: 'by',
      fingertipMm: null,
      portraitUrl: null,
    },
    demo: [],
  });
  async function go(url: string, role: Role | null): Promise<string> {
    const arrived = router.navigateByUrl(url);
    await new Promise((resolve) => setTimeout(resolve)); // the router takes a turn before it asks its guards
    TestBed.inject(HttpTestingController).expectOne('/api/session').flush(session(role));
    await arrived;
    return router.url;
  }
  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'desk/tray', canMatch: [signedIn], children: [] },
          { path: 'keep', canMatch: [hasRole('keeper')], children: [] },
          { path: 'sign-in', children: [] },
          { path: '**', redirectTo: 'sign-in' },
        ]),
      ],
    });
    router = TestBed.inject(Router);
  });

  it('lets in who is signed in, once that is known', async () => {
    expect(await go('/desk/tray', 'photographer')).toBe('/desk/tray');
  });

  it('sends a visitor to sign in, and says where to go on', async () => {
    expect(await go('/desk/tray?batch=2', null)).toBe('/sign-in?then=%2Fdesk%2Ftray%3Fbatch%3D2');
  });

  it('keeps the keeper’s desk to keepers', async () => {
    expect(await go('/keep', 'keeper')).toBe('/keep');
  });

  it('has no such page for others', async () => {
    expect(await go('/keep', 'editor')).toBe('/sign-in');
  });
});
