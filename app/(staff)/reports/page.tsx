import type { Metadata } from "next";
import { Comebacks, HoursSold, QuotedApproved, Ranks, StageTimes, WaitingShares } from "@/components/reports/charts";
import { ClosedWeeks } from "@/components/reports/closed-weeks";
import { ReportsPage } from "@/components/reports/reports-page";
import { formatDate, formatNumber, formatShortDate } from "@/components/ui/format";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { readReports } from "@/lib/services/reports/read";
import { readShop } from "@/lib/services/shops/read";
import { one, type Search } from "../_views/address";
import { OwnersOnly } from "../_views/owners-only";
import { StaffTop } from "../_views/staff-top";
import {
  comebackFinding,
  hoursFinding,
  quotedFinding,
  rankFinding,
  stageFinding,
  takingsFinding,
  waitingFinding,
  weekLabel,
  weeksOf,
} from "./_views/figures";

export const metadata: Metadata = { title: "Reports" };

const SPANS = [30, 90] as const;
const DAY_MS = 86_400_000;

export default async function Page({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  if (!mayDo(ctx.actor.role, "report.read"))
    return (
      <OwnersOnly
        ctx={ctx}
        current="reports"
        title="The reports are the owner’s to read"
        what="They tell where hours go, what comes back and what is agreed."
      />
    );
  const asked = one((await searchParams).days);
  const days = SPANS.find((each) => String(each) === asked) ?? 90;
  const { shop, settings } = await readShop(ctx);
  const { timeZone, currency, locale } = settings;
  const span = { from: new Date(ctx.now.getTime() - days * DAY_MS), to: ctx.now, timeZone };
  const reports = await readReports(ctx, span);
  const weeks = weeksOf(span);
  const money = { currency, locale };
  const stages = stageFinding(reports.stages);
  const waiting = waitingFinding(reports.waiting, weeks);
  const quoted = quotedFinding(reports.quoted, weeks, money);
  const hours = hoursFinding(reports.hours);
  const back = comebackFinding(reports, span);
  const taken = takingsFinding(reports, weeks, money);
  const closed = reports.ended.reduce((sum, week) => sum + week.closed, 0);
  const released = reports.ended.reduce((sum, week) => sum + week.released, 0);
  const from = formatDate(span.from.toISOString(), timeZone, false);
  const to = formatDate(span.to.toISOString(), timeZone, false);
  const diagnosis =
    reports.diagnosisH > 0 ? `; ${formatNumber(reports.diagnosisH, 1, { locale })} h of diagnosis not counted` : "";
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="reports" />
      <ReportsPage
        title={`${days} days, ${from} to ${to}`}
        sub={`${closed} ${closed === 1 ? "case" : "cases"} closed${released > 0 ? `, ${released} left unrepaired` : ""}. The first and the last week are not whole.`}
        spans={SPANS.map((each) => ({ label: `${each} days`, href: `/reports?days=${each}`, current: each === days }))}
        isEmpty={reports.stages.length === 0 && reports.waiting.length === 0}
      >
        <StageTimes title={stages.title} rows={stages.rows} />
        <WaitingShares title={waiting.title} rows={waiting.rows} weekLabels={weeks.map(weekLabel)} />
        <QuotedApproved title={quoted.title} weeks={quoted.rows} currency={currency} locale={locale} />
        <HoursSold
          title={hours.title}
          note={`Agreed jobs finished; sold hours shared by time on the clock${diagnosis}`}
          rows={hours.rows}
        />
        <Comebacks
          title={back.title}
          rows={back.rows}
          from={formatShortDate(span.from.toISOString(), timeZone)}
          to={formatShortDate(span.to.toISOString(), timeZone)}
        />
        <Ranks title={rankFinding(reports.ranks)} ranks={reports.ranks} />
        <ClosedWeeks title={taken.title} weeks={taken.rows} currency={currency} locale={locale} />
      </ReportsPage>
    </>
  );
}
