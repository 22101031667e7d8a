import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { Router, Routes, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';

import { problemInterceptor } from '../../http/interceptors';

/** A screen opened at an address, with the requests it makes to be answered by the spec. */
export interface Screen {
  readonly element: HTMLElement;
  readonly http: HttpTestingController;
  readonly loader: HarnessLoader;
  readonly router: Router;
  text(): string;
  button(name: string): HTMLButtonElement;
  link(name: string): HTMLAnchorElement;
  settle(): Promise<void>;
}

export async function openScreen(routes: Routes, address: string): Promise<Screen> {
  TestBed.configureTestingModule({
    providers: [
      provideRouter(routes, withComponentInputBinding()),
      provideHttpClient(withInterceptors([problemInterceptor])),
      provideHttpClientTesting(),
    ],
  });
  const harness = await RouterTestingHarness.create(address);
  const { fixture } = harness;
  const element: HTMLElement = fixture.nativeElement;
  const text = () => (element.textContent ?? '').replace(/\s+/g, ' ');
  return {
    element,
    http: TestBed.inject(HttpTestingController),
    loader: TestbedHarnessEnvironment.loader(fixture),
    router: TestBed.inject(Router),
    text,
    button: (name) => named(element, 'button', name),
    link: (name) => named(element, 'a', name),
    settle: () => fixture.whenStable(),
  };
}

function named<Tag extends 'a' | 'button'>(
  element: HTMLElement,
  tag: Tag,
  name: string,
): HTMLElementTagNameMap[Tag] {
  const found = [...element.querySelectorAll(tag)].find((each) =>
    (each.textContent ?? '').replace(/\s+/g, ' ').includes(name),
  );
  if (!found) throw new Error(`No ${tag} says "${name}": ${element.textContent}`);
  return found;
}
