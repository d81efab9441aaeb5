import type { RouteRecordRaw } from 'vue-router'
import { ADMINISTRATORS, ANY_MEMBER, CREW, LEADS, POLICY_MAKERS } from '#shared/contracts/roles.ts'
import { registryRoutes } from './registry-routes.ts'

/**
 * Every page, one table. The name is the slug of the page; views are loaded when they are first opened. `light` pages
 * must use neither the component library nor `@pinia/colada`: they are the ones that open at 3 am on a phone.
 */
export const routes: RouteRecordRaw[] = [
  {
    path: '/',
    name: 'board',
    component: () => import('@/views/BoardView.vue'),
    meta: { title: 'Board', roles: ANY_MEMBER, light: true },
  },
  {
    path: '/kits/:kitId',
    name: 'kit',
    component: () => import('@/views/KitView.vue'),
    props: true,
    meta: { title: 'Kit', roles: CREW, light: true },
  },
  {
    path: '/tests/:testId',
    name: 'test',
    component: () => import('@/views/TestView.vue'),
    props: true,
    meta: { title: 'Test', roles: CREW, light: true },
  },
  {
    path: '/items/:itemId/tests/new/:procedure',
    name: 'record-test',
    component: () => import('@/views/RecordTestView.vue'),
    props: true,
    meta: { title: 'Record a test', roles: CREW, light: true },
  },
  {
    path: '/kits/:kitId/tests/new/:procedure(count|on-air-check)',
    name: 'record-kit-test',
    component: () => import('@/views/RecordKitTestView.vue'),
    props: true,
    meta: { title: 'Test a kit', roles: CREW, light: true },
  },
  {
    path: '/due',
    name: 'tests',
    component: () => import('@/views/DueChecksView.vue'),
    meta: { title: 'Tests due', roles: CREW, light: true },
  },
  {
    path: '/forecast',
    name: 'forecast',
    component: () => import('@/views/ForecastView.vue'),
    meta: { title: 'Forecast', roles: CREW, light: true },
  },
  {
    path: '/advice',
    name: 'advice',
    component: () => import('@/views/AdviceView.vue'),
    meta: { title: 'What to do', roles: CREW, light: true },
  },
  {
    path: '/what-if',
    name: 'what-if',
    component: () => import('@/views/WhatIfView.vue'),
    meta: { title: 'What if', roles: CREW, light: true },
  },
  {
    path: '/work-party',
    name: 'work-party',
    component: () => import('@/views/WorkPartyView.vue'),
    meta: { title: 'Work party', roles: CREW, light: true },
  },
  {
    path: '/weather',
    name: 'weather',
    component: () => import('@/views/WeatherView.vue'),
    meta: { title: 'After weather', roles: LEADS, light: true },
  },
  {
    path: '/policy',
    name: 'policy',
    component: () => import('@/views/PolicyView.vue'),
    meta: { title: 'Policy', roles: CREW, light: true },
  },
  {
    path: '/policy/new',
    name: 'new-policy',
    component: () => import('@/views/NewPolicyView.vue'),
    meta: { title: 'New policy', roles: POLICY_MAKERS, light: true },
  },
  {
    path: '/people',
    name: 'people',
    component: () => import('@/views/PeopleView.vue'),
    meta: { title: 'People', roles: ADMINISTRATORS },
  },
  {
    path: '/people/new',
    name: 'new-person',
    component: () => import('@/views/InvitePersonView.vue'),
    meta: { title: 'Invite somebody', roles: ADMINISTRATORS },
  },
  {
    path: '/people/undelivered',
    name: 'undelivered',
    component: () => import('@/views/UndeliveredView.vue'),
    meta: { title: 'Undelivered mail', roles: ADMINISTRATORS, light: true },
  },
  {
    path: '/people/:memberId',
    name: 'person',
    component: () => import('@/views/PersonView.vue'),
    props: true,
    meta: { title: 'Member', roles: ADMINISTRATORS },
  },
  {
    path: '/reminders/:token',
    name: 'reminder-link',
    component: () => import('@/views/ReminderLinkView.vue'),
    props: true,
    meta: { title: 'Your reminders', public: true, light: true },
  },
  ...registryRoutes,
  {
    path: '/profile',
    name: 'profile',
    component: () => import('@/views/ProfileView.vue'),
    meta: { title: 'Your profile', light: true },
  },
  {
    path: '/more',
    name: 'more',
    component: () => import('@/views/MoreView.vue'),
    meta: { title: 'Everything', light: true },
  },
  {
    path: '/sign-in',
    name: 'sign-in',
    component: () => import('@/views/SignInView.vue'),
    meta: { title: 'Sign in', public: true, light: true },
  },
  {
    path: '/forgot-password',
    name: 'forgot-password',
    component: () => import('@/views/ForgotPasswordView.vue'),
    meta: { title: 'Forgot password', public: true, light: true },
  },
  {
    // Mailed links lead here: /invitation#<secret> and /reset-password#<secret>.
    path: '/invitation',
    alias: '/reset-password',
    name: 'mailed-link',
    component: () => import('@/views/MailedLinkView.vue'),
    meta: { title: 'Your link', public: true, light: true },
  },
  {
    path: '/not-allowed',
    name: 'not-allowed',
    component: () => import('@/views/NotAllowedView.vue'),
    meta: { title: 'Not allowed', light: true },
  },
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: () => import('@/views/NotFoundView.vue'),
    meta: { title: 'Not found', public: true, light: true },
  },
]
