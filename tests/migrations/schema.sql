CREATE TABLE `call` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `call_key` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `scope` enum('lane','pair','house') NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `equipment` varchar(20) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `safety` varchar(20) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `lanes_held` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`lanes_held`)),
  `raised_at` datetime(3) NOT NULL,
  `received_at` datetime(3) NOT NULL,
  `raised_by` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`raised_by`)),
  `origin` enum('stop','fault','bowler','desk','mechanic') NOT NULL,
  `text` text DEFAULT NULL,
  `code` varchar(64) DEFAULT NULL,
  `status` enum('unanswered','acknowledged','on-lane','parked','out-of-service','closed') NOT NULL,
  `acknowledged_at` datetime(3) DEFAULT NULL,
  `acknowledged_by` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`acknowledged_by`)),
  `on_lane_at` datetime(3) DEFAULT NULL,
  `on_lane_by` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`on_lane_by`)),
  `parked` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`parked`)),
  `out_of_service` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`out_of_service`)),
  `returned_at` datetime(3) DEFAULT NULL,
  `cleared_at` datetime(3) DEFAULT NULL,
  `cleared_by` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`cleared_by`)),
  `cause` varchar(60) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `note` text DEFAULT NULL,
  `lockout` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`lockout`)),
  `stops` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`stops`)),
  `steps` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`steps`)),
  `raises` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`raises`)),
  `last_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`id`),
  KEY `call_raised` (`centre_id`,`raised_at`),
  KEY `call_lane` (`centre_id`,`lane`,`raised_at`),
  KEY `call_status` (`centre_id`,`status`),
  KEY `call_ended` (`centre_id`,`status`,`last_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `centre` (
  `id` binary(16) NOT NULL,
  `slug` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `name` varchar(80) NOT NULL,
  `zone` varchar(64) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `cut` smallint(5) unsigned NOT NULL,
  `lanes` tinyint(3) unsigned NOT NULL,
  `opening` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`opening`)),
  `created_at` datetime(3) NOT NULL,
  `rules` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`rules`)),
  PRIMARY KEY (`id`),
  UNIQUE KEY `centre_slug` (`slug`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `centre_head` (
  `centre_id` binary(16) NOT NULL,
  `seq` bigint(20) unsigned NOT NULL DEFAULT 0,
  `epoch` binary(16) NOT NULL,
  `fold_version` int(10) unsigned NOT NULL,
  `checkpoint_at` bigint(20) NOT NULL DEFAULT 0,
  PRIMARY KEY (`centre_id`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `concern` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `session_id` binary(16) NOT NULL,
  `user_name` varchar(80) NOT NULL,
  `raised_at` datetime(3) NOT NULL,
  `text` varchar(500) NOT NULL,
  `lane` tinyint(3) unsigned DEFAULT NULL,
  `settled_at` datetime(3) DEFAULT NULL,
  `settled_by` varchar(80) DEFAULT NULL,
  `settled_note` varchar(300) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`id`),
  KEY `concern_session` (`centre_id`,`session_id`,`raised_at`),
  CONSTRAINT `concern_fk` FOREIGN KEY (`centre_id`, `session_id`) REFERENCES `session` (`centre_id`, `id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `confirmation` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `session_id` binary(16) NOT NULL,
  `user_id` binary(16) NOT NULL,
  `user_name` varchar(80) NOT NULL,
  `confirmed_at` datetime(3) NOT NULL,
  `shown` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`shown`)),
  `shown_sha256` varchar(64) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `worse` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`worse`)),
  `reopened_at` datetime(3) DEFAULT NULL,
  `reopened_because` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`reopened_because`)),
  PRIMARY KEY (`centre_id`,`id`),
  KEY `confirmation_session` (`centre_id`,`session_id`,`confirmed_at`),
  CONSTRAINT `confirmation_fk` FOREIGN KEY (`centre_id`, `session_id`) REFERENCES `session` (`centre_id`, `id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `display_link` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `name` varchar(60) NOT NULL,
  `token_hash` binary(32) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `created_by` varchar(80) NOT NULL,
  `seen_at` datetime(3) DEFAULT NULL,
  `revoked_at` datetime(3) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`id`),
  UNIQUE KEY `display_link_id` (`id`),
  UNIQUE KEY `display_link_token` (`token_hash`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `gateway` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `name` varchar(80) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `heard_at` datetime(3) DEFAULT NULL,
  `started_at` datetime(3) DEFAULT NULL,
  `queued` int(10) unsigned DEFAULT NULL,
  `uptime_s` bigint(20) unsigned DEFAULT NULL,
  `clock_error_ms` bigint(20) DEFAULT NULL,
  `changed_repeats` int(10) unsigned NOT NULL DEFAULT 0,
  `changed_repeat_at` datetime(3) DEFAULT NULL,
  `sequences` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`sequences`)),
  PRIMARY KEY (`centre_id`,`id`),
  UNIQUE KEY `gateway_name` (`centre_id`,`name`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `gateway_key` (
  `hash` binary(32) NOT NULL,
  `id` binary(16) NOT NULL,
  `centre_id` binary(16) NOT NULL,
  `gateway_id` binary(16) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `revoked_at` datetime(3) DEFAULT NULL,
  PRIMARY KEY (`hash`),
  UNIQUE KEY `gateway_key_id` (`id`),
  KEY `gateway_key_gateway_fk` (`centre_id`,`gateway_id`),
  CONSTRAINT `gateway_key_gateway_fk` FOREIGN KEY (`centre_id`, `gateway_id`) REFERENCES `gateway` (`centre_id`, `id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `idempotency` (
  `actor` varchar(60) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `idempotency_key` varchar(200) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `request_hash` binary(32) NOT NULL,
  `state` enum('pending','applied','answered') NOT NULL,
  `status` smallint(5) unsigned DEFAULT NULL,
  `answer` mediumtext DEFAULT NULL,
  `created_at` datetime(3) NOT NULL,
  PRIMARY KEY (`actor`,`idempotency_key`),
  KEY `idempotency_created` (`created_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `job_run` (
  `centre_id` binary(16) NOT NULL,
  `job` varchar(60) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `business_date` date NOT NULL,
  `done_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`job`,`business_date`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `journal` (
  `centre_id` binary(16) NOT NULL,
  `seq` bigint(20) unsigned NOT NULL,
  `n` smallint(5) unsigned NOT NULL,
  `source` varchar(255) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `id` varchar(255) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `type` varchar(64) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `stream` varchar(128) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `time_at` datetime(3) NOT NULL,
  `time_sent` datetime(3) DEFAULT NULL,
  `received_at` datetime(3) NOT NULL,
  `status` enum('applied','set-aside') NOT NULL,
  `reason` varchar(64) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `applied_at` datetime(3) DEFAULT NULL,
  `by_kind` enum('user','gateway','job') DEFAULT NULL,
  `by_id` varchar(64) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `by_name` varchar(80) DEFAULT NULL,
  `data` mediumtext DEFAULT NULL,
  `sent` mediumtext DEFAULT NULL,
  `content_hash` binary(32) NOT NULL,
  PRIMARY KEY (`centre_id`,`seq`,`n`),
  UNIQUE KEY `journal_event` (`centre_id`,`source`,`id`),
  KEY `journal_time` (`centre_id`,`status`,`time_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `lane` (
  `centre_id` binary(16) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `family` enum('free-fall','string') NOT NULL,
  `certified_until` date DEFAULT NULL,
  `stop_coverage` enum('heard','logged','none') NOT NULL,
  PRIMARY KEY (`centre_id`,`lane`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `lane_out` (
  `centre_id` binary(16) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `from_at` datetime(3) NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `to_at` datetime(3) DEFAULT NULL,
  `reason` varchar(300) NOT NULL,
  PRIMARY KEY (`centre_id`,`lane`,`from_at`),
  KEY `lane_out_to` (`centre_id`,`to_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `lane_state` (
  `centre_id` binary(16) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `use_now` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`use_now`)),
  `progress` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`progress`)),
  `power` enum('on','off','unknown') NOT NULL,
  `stop` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`stop`)),
  `bumpers` tinyint(1) NOT NULL,
  `out_of_service` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`out_of_service`)),
  `dressed` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`dressed`)),
  `broken_off` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`broken_off`)),
  `deliveries_since` int(10) unsigned NOT NULL,
  `deliveries_since_by` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`deliveries_since_by`)),
  `frames_ever` bigint(20) unsigned NOT NULL,
  `stop_marks` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`stop_marks`)),
  `hears` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`hears`)),
  `source` varchar(255) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `last_at` bigint(20) NOT NULL,
  PRIMARY KEY (`centre_id`,`lane`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `lane_use` (
  `centre_id` binary(16) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `from_at` datetime(3) NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `kind` varchar(16) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `to_at` datetime(3) DEFAULT NULL,
  `last_delivery_at` datetime(3) DEFAULT NULL,
  `bowlers` smallint(5) unsigned DEFAULT NULL,
  `label` varchar(120) DEFAULT NULL,
  `until_at` datetime(3) DEFAULT NULL,
  `games` smallint(5) unsigned DEFAULT NULL,
  `opened_by` enum('user','gateway','job') NOT NULL,
  PRIMARY KEY (`centre_id`,`lane`,`from_at`),
  KEY `lane_use_from` (`centre_id`,`from_at`),
  KEY `lane_use_to` (`centre_id`,`to_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `league` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `name` varchar(60) NOT NULL,
  `weekday` tinyint(3) unsigned NOT NULL,
  `start_minutes` smallint(5) unsigned NOT NULL,
  `warm_up_minutes` smallint(5) unsigned NOT NULL,
  `from_lane` tinyint(3) unsigned NOT NULL,
  `to_lane` tinyint(3) unsigned NOT NULL,
  `teams` tinyint(3) unsigned NOT NULL,
  `bowlers_a_team` tinyint(3) unsigned NOT NULL,
  `games` tinyint(3) unsigned NOT NULL,
  `absent` tinyint(3) unsigned NOT NULL,
  `crosses_lanes` tinyint(1) NOT NULL,
  `first_date` date NOT NULL,
  `last_date` date NOT NULL,
  `skip_dates` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`skip_dates`)),
  `pattern` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `revision` smallint(5) unsigned DEFAULT NULL,
  `fresh` tinyint(1) NOT NULL,
  `sanctioned` tinyint(1) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `ended_at` datetime(3) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`id`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `machine` (
  `centre_id` binary(16) NOT NULL,
  `code` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `name` varchar(60) NOT NULL,
  `capabilities` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`capabilities`)),
  `created_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`code`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `mail_outbox` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `mail_key` varchar(160) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `recipient` varchar(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `message_id` varchar(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `subject` varchar(200) NOT NULL,
  `text_body` text NOT NULL,
  `html_body` text NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `next_try_at` datetime(3) NOT NULL,
  `sent_at` datetime(3) DEFAULT NULL,
  `attempts` int(10) unsigned NOT NULL DEFAULT 0,
  `last_error` varchar(300) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`id`),
  UNIQUE KEY `mail_outbox_once` (`centre_id`,`mail_key`,`recipient`),
  KEY `mail_outbox_due` (`sent_at`,`next_try_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `membership` (
  `centre_id` binary(16) NOT NULL,
  `user_id` binary(16) NOT NULL,
  `role` enum('manager','desk','mechanic','secretary') NOT NULL,
  `created_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`user_id`),
  KEY `membership_user` (`user_id`),
  CONSTRAINT `membership_user_fk` FOREIGN KEY (`user_id`) REFERENCES `user` (`id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `membership_league` (
  `centre_id` binary(16) NOT NULL,
  `user_id` binary(16) NOT NULL,
  `league_id` binary(16) NOT NULL,
  PRIMARY KEY (`centre_id`,`user_id`,`league_id`),
  KEY `membership_league_league` (`centre_id`,`league_id`),
  CONSTRAINT `membership_league_fk` FOREIGN KEY (`centre_id`, `user_id`) REFERENCES `membership` (`centre_id`, `user_id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `night_report` (
  `centre_id` binary(16) NOT NULL,
  `business_date` date NOT NULL,
  `issued_at` datetime(3) NOT NULL,
  `figures` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`figures`)),
  PRIMARY KEY (`centre_id`,`business_date`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `outbox` (
  `centre_id` binary(16) NOT NULL,
  `seq` bigint(20) unsigned NOT NULL,
  `lanes` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`lanes`)),
  `topics` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`topics`)),
  `written_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`seq`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `pattern` (
  `centre_id` binary(16) NOT NULL,
  `code` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `name` varchar(60) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`code`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `pattern_revision` (
  `centre_id` binary(16) NOT NULL,
  `code` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `revision` int(10) unsigned NOT NULL,
  `body` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`body`)),
  `note` varchar(300) DEFAULT NULL,
  `written_by` varchar(80) NOT NULL,
  `written_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`code`,`revision`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `quarter_counter` (
  `centre_id` binary(16) NOT NULL,
  `quarter_at` datetime(3) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `kind` varchar(16) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `opened` bigint(20) NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `deliveries` int(10) unsigned NOT NULL,
  `cycles` int(10) unsigned NOT NULL,
  `frames` int(10) unsigned NOT NULL,
  `frames_estimated` int(10) unsigned NOT NULL,
  `games` int(10) unsigned NOT NULL,
  PRIMARY KEY (`centre_id`,`quarter_at`,`lane`,`kind`,`opened`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `readiness_weight` (
  `centre_id` binary(16) NOT NULL,
  `check_name` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `weight` enum('holds','warns','ignored') NOT NULL,
  PRIMARY KEY (`centre_id`,`check_name`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `run` (
  `centre_id` binary(16) NOT NULL,
  `run_key` varchar(176) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `machine` varchar(80) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `run` varchar(80) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `pattern` varchar(80) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `revision` int(10) unsigned DEFAULT NULL,
  `lanes` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin DEFAULT NULL CHECK (json_valid(`lanes`)),
  `status` enum('planned','under-way','finished','aborted','cancelled') NOT NULL,
  `planned_start` datetime(3) DEFAULT NULL,
  `started_at` datetime(3) DEFAULT NULL,
  `ended_at` datetime(3) DEFAULT NULL,
  `reason` varchar(300) DEFAULT NULL,
  `entered` enum('gateway','hand') NOT NULL,
  `last_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`run_key`),
  KEY `run_last` (`centre_id`,`last_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `run_lane` (
  `centre_id` binary(16) NOT NULL,
  `run_key` varchar(176) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  `version` bigint(20) unsigned NOT NULL,
  `position` smallint(5) unsigned NOT NULL,
  `outcome` enum('dressed','skipped','broken-off') NOT NULL,
  `started_at` datetime(3) DEFAULT NULL,
  `finished_at` datetime(3) DEFAULT NULL,
  `a_ul` int(10) unsigned DEFAULT NULL,
  `b_ul` int(10) unsigned DEFAULT NULL,
  `cleaner_ul` int(10) unsigned DEFAULT NULL,
  `measured` tinyint(1) NOT NULL,
  `reason` varchar(300) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`run_key`,`lane`),
  KEY `run_lane_lane` (`centre_id`,`lane`,`finished_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `session` (
  `centre_id` binary(16) NOT NULL,
  `id` binary(16) NOT NULL,
  `league_id` binary(16) DEFAULT NULL,
  `kind` enum('league','tournament','party','open','practice','coaching','maintenance') NOT NULL,
  `name` varchar(60) NOT NULL,
  `business_date` date NOT NULL,
  `season_date` date DEFAULT NULL,
  `warm_up_at` datetime(3) NOT NULL,
  `start_at` datetime(3) NOT NULL,
  `end_at` datetime(3) NOT NULL,
  `status` enum('booked','cancelled') NOT NULL,
  `changed` tinyint(1) NOT NULL,
  `pattern` varchar(40) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin DEFAULT NULL,
  `revision` smallint(5) unsigned DEFAULT NULL,
  `fresh` tinyint(1) NOT NULL,
  `sanctioned` tinyint(1) NOT NULL,
  `teams` tinyint(3) unsigned DEFAULT NULL,
  `bowlers` tinyint(3) unsigned DEFAULT NULL,
  `games` tinyint(3) unsigned DEFAULT NULL,
  `absent` tinyint(3) unsigned DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`id`),
  UNIQUE KEY `session_season_night` (`centre_id`,`league_id`,`season_date`),
  KEY `session_business_date` (`centre_id`,`business_date`),
  KEY `session_warm_up` (`centre_id`,`warm_up_at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `session_lane` (
  `centre_id` binary(16) NOT NULL,
  `session_id` binary(16) NOT NULL,
  `lane` tinyint(3) unsigned NOT NULL,
  PRIMARY KEY (`centre_id`,`session_id`,`lane`),
  CONSTRAINT `session_lane_fk` FOREIGN KEY (`centre_id`, `session_id`) REFERENCES `session` (`centre_id`, `id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `session_verdict` (
  `centre_id` binary(16) NOT NULL,
  `session_id` binary(16) NOT NULL,
  `verdict` enum('planned','at-risk','held','ready') NOT NULL,
  `since` datetime(3) NOT NULL,
  `lanes` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`lanes`)),
  `transitions` longtext CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL CHECK (json_valid(`transitions`)),
  `frozen_at` datetime(3) DEFAULT NULL,
  `told_held_60_at` datetime(3) DEFAULT NULL,
  `told_held_30_at` datetime(3) DEFAULT NULL,
  `told_ready_at` datetime(3) DEFAULT NULL,
  PRIMARY KEY (`centre_id`,`session_id`),
  CONSTRAINT `session_verdict_fk` FOREIGN KEY (`centre_id`, `session_id`) REFERENCES `session` (`centre_id`, `id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `stream_checkpoint` (
  `centre_id` binary(16) NOT NULL,
  `at` bigint(20) NOT NULL,
  `fold_version` int(10) unsigned NOT NULL,
  `state` longtext NOT NULL,
  `written_at` datetime(3) NOT NULL,
  PRIMARY KEY (`centre_id`,`at`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `user` (
  `id` binary(16) NOT NULL,
  `email` varchar(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_nopad_bin NOT NULL,
  `name` varchar(80) NOT NULL,
  `password_hash` varchar(200) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  PRIMARY KEY (`id`),
  UNIQUE KEY `user_email` (`email`)
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;

CREATE TABLE `user_session` (
  `id` binary(16) NOT NULL,
  `secret_hash` binary(32) NOT NULL,
  `user_id` binary(16) NOT NULL,
  `created_at` datetime(3) NOT NULL,
  `seen_at` datetime(3) NOT NULL,
  `idle_until` datetime(3) NOT NULL,
  `ends_at` datetime(3) NOT NULL,
  `idle_ms` int(10) unsigned NOT NULL,
  `agent` varchar(200) NOT NULL,
  `address` varchar(64) NOT NULL,
  PRIMARY KEY (`id`),
  UNIQUE KEY `user_session_secret` (`secret_hash`),
  KEY `user_session_user` (`user_id`),
  KEY `user_session_ends` (`ends_at`),
  CONSTRAINT `user_session_user_fk` FOREIGN KEY (`user_id`) REFERENCES `user` (`id`) ON DELETE CASCADE
) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci;
