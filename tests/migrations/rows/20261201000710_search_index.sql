select renew_report_search('00000000-0000-4000-8000-0000000000e1');
