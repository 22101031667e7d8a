import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { Router, provideRouter } from '@angular/router';
import { vi } from 'vitest';

import { SignIn } from './sign-in';

describe('SignIn', () => {
  function open(returnTo?: string) {
    TestBed.configureTestingModule({
      providers: [provideRouter([]), provideHttpClient(), provideHttpClientTesting()],
    });
    const fixture = TestBed.createComponent(SignIn);
    fixture.componentRef.setInput('returnTo', returnTo);
    const navigate = vi
      .spyOn(TestBed.inject(Router), 'navigateByUrl')
      .mockResolvedValue(true);
    return {
      fixture,
      navigate,
      loader: TestbedHarnessEnvironment.loader(fixture),
      server: TestBed.inject(HttpTestingController),
      element: fixture.nativeElement as HTMLElement,
    };
  }

  async function fillIn(loader: ReturnType<typeof open>['loader']): Promise<void> {
    const [email, password] = await loader.getAllHarnesses(MatInputHarness);
    await email?.setValue('anna@example.org');
    await password?.setValue('four unrelated words');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Sign in' }))).click();
  }

  it('goes back to where the reader came from', async () => {
    const { loader, server, navigate } = open('/file');
    await fillIn(loader);
    const request = server.expectOne({ method: 'POST', url: '/api/session' });
    expect(request.request.body).toEqual({
      email: 'anna@example.org',
      password: 'four unrelated words',
    });
    request.flush({ person: null });
    expect(navigate).toHaveBeenCalledWith('/file');
  });

  it('says that address and password don’t go together, and lets try again', async () => {
    const { loader, server, element } = open();
    await fillIn(loader);
    server.expectOne('/api/session').flush(
      { type: 'about:blank', title: '', status: 401, code: 'wrong_credentials' },
      { status: 401, statusText: 'Unauthorized' },
    );
    const button = await loader.getHarness(MatButtonHarness.with({ text: 'Sign in' }));
    expect(await button.isDisabled()).toBe(false);
    expect(element.querySelector('[role=alert]')?.textContent).toContain('go together');
  });

  it('asks for what is missing and sends nothing', async () => {
    const { loader, server } = open();
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Sign in' }))).click();
    const [email] = await loader.getAllHarnesses(MatFormFieldHarness);
    expect(await email?.getTextErrors()).toEqual(['This is needed.']);
    server.expectNone('/api/session');
  });
});
