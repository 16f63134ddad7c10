// Invented demo chip: the controller of an unmanned tide station. Four sensor channels filter the
// water level, a log keeps the last values, a controller runs the sluice, a sender talks to the
// shore. Cells named directly (clock gates, bus drivers, a flip-flop bank, latches) are those of
// the invented library of the demo.

module tide_station (
    clk, probe_clk, phase_1, phase_2, rst_n, wake,
    probe, calibrate, calibration, sluice_limit, channel, read_log, log_address,
    bus, gate_open, gate_close, alarm, serial_out, beacon, parity_ok
);
  input clk, probe_clk, phase_1, phase_2, rst_n, wake;
  input [3:0] probe;
  input calibrate;
  input [3:0] calibration;
  input [1:0] sluice_limit;
  input [1:0] channel;
  input read_log;
  input [3:0] log_address;
  output [7:0] bus;
  output gate_open, gate_close, alarm, serial_out, beacon, parity_ok;

  wire [11:0] level0, level1, level2, level3;
  wire [3:0] fresh, high;
  wire quiet_clk, slow_clk, clear_n;
  reg soft_clear;
  reg [5:0] seconds;

  // the sensors sleep until something wakes the station
  clock_gate_test_w4 doze (.CK(clk), .E(wake), .T(1'b0), .GCK(quiet_clk));

  // a reset made by logic: the controller can clear the sender on its own
  assign clear_n = rst_n & ~soft_clear;

  gauge_channel gauge0 (quiet_clk, probe_clk, rst_n, probe[0], calibrate, calibration, level0, fresh[0], high[0]);
  gauge_channel gauge1 (quiet_clk, probe_clk, rst_n, probe[1], calibrate, calibration, level1, fresh[1], high[1]);
  gauge_channel gauge2 (quiet_clk, probe_clk, rst_n, probe[2], calibrate, calibration, level2, fresh[2], high[2]);
  gauge_channel gauge3 (quiet_clk, probe_clk, rst_n, probe[3], calibrate, calibration, level3, fresh[3], high[3]);

  wire [11:0] level = channel[1] ? (channel[0] ? level3 : level2) : (channel[0] ? level1 : level0);
  wire [13:0] sum = level0 + level1 + level2 + level3;
  wire [15:0] logged;

  tide_log log (clk, |fresh, log_address, {channel, sum}, logged);

  sluice_control sluice (clk, rst_n, level, sluice_limit, high, gate_open, gate_close, alarm);

  always @(posedge clk or negedge rst_n)
    if (!rst_n) begin
      seconds <= 6'd0;
      soft_clear <= 1'b0;
    end else begin
      seconds <= seconds == 6'd59 ? 6'd0 : seconds + 6'd1;
      soft_clear <= seconds == 6'd58;
    end

  slow_clock divider (clk, rst_n, slow_clk);
  shore_sender sender (slow_clk, clear_n, alarm, level[11:4], serial_out, beacon);

  wire [7:0] safe;
  phase_guard guard (phase_1, phase_2, level[7:0], safe);
  assign parity_ok = ~^{safe, seconds[0]};

  // one bus, three drivers, exactly one of them on
  wire from_log = read_log;
  wire from_level = ~read_log & ~calibrate;
  wire from_guard = ~read_log & calibrate;
  bus_drive_w2 drive_log [7:0] (.A(logged[7:0]), .E(from_log), .Y(bus));
  bus_drive_w2 drive_level [7:0] (.A(level[11:4]), .E(from_level), .Y(bus));
  bus_drive_w2 drive_guard [7:0] (.A(safe), .E(from_guard), .Y(bus));
endmodule

// One sensor: a serial probe read on the falling edge of its own clock, brought over to the main
// clock, assembled, averaged over four values.
module gauge_channel (clk, probe_clk, rst_n, probe, calibrate, calibration, level, fresh, high);
  input clk, probe_clk, rst_n, probe, calibrate;
  input [3:0] calibration;
  output [11:0] level;
  output fresh, high;

  // read on the falling edge, gathered on the rising one
  reg sampled;
  reg [9:0] word;
  reg [3:0] bits;
  reg ready;
  always @(negedge probe_clk or negedge rst_n)
    if (!rst_n) sampled <= 1'b0;
    else sampled <= probe;
  always @(posedge probe_clk or negedge rst_n)
    if (!rst_n) begin
      word <= 10'd0;
      bits <= 4'd0;
      ready <= 1'b0;
    end else begin
      word <= {word[8:0], sampled};
      bits <= bits == 4'd9 ? 4'd0 : bits + 4'd1;
      ready <= bits == 4'd9 ? ~ready : ready;
    end

  // over to the main clock: a shift register of three
  reg [2:0] seen;
  reg [9:0] held [0:3];
  reg [11:0] total;
  reg flag, above;
  always @(posedge clk or negedge rst_n)
    if (!rst_n) seen <= 3'b000;
    else seen <= {seen[1:0], ready};

  wire take = seen[2] ^ seen[1];
  always @(posedge clk)
    if (take) begin
      held[0] <= word;
      held[1] <= held[0];
      held[2] <= held[1];
      held[3] <= held[2];
    end

  wire [3:0] offset;
  flop_bank4_w1 offset_bank (.D(calibrate ? calibration : offset), .CK(clk), .RN(rst_n), .Q(offset));

  always @(posedge clk or negedge rst_n)
    if (!rst_n) begin
      total <= 12'd0;
      flag <= 1'b0;
      above <= 1'b1;
    end else begin
      total <= held[0] + held[1] + held[2] + held[3] + {8'd0, offset};
      flag <= take;
      above <= total > 12'd3000;
    end
  assign level = total;
  assign fresh = flag;
  assign high = above;
endmodule

// Sixteen words of sixteen bits, written in turn; no reset, as in a memory.
module tide_log (clk, write, address, value, found);
  input clk, write;
  input [3:0] address;
  input [15:0] value;
  output [15:0] found;
  reg [15:0] words [0:15];
  reg [3:0] next;
  reg [15:0] shown;
  always @(posedge clk) begin
    if (write) begin
      words[next] <= value;
      next <= next + 4'd1;
    end
    shown <= words[address];
  end
  assign found = shown;
endmodule

// Opens and closes the sluice, one state a flip-flop.
module sluice_control (clk, rst_n, level, limit, high, gate_open, gate_close, alarm);
  input clk, rst_n;
  input [11:0] level;
  input [1:0] limit;
  input [3:0] high;
  output gate_open, gate_close, alarm;
  reg [3:0] state;
  reg [9:0] wait_time;
  reg [11:0] before;
  reg warned, alarm_n;
  wire [11:0] top = {2'b10, limit, 8'd0};
  wire rising = level > before;
  wire over = level > top | &high;
  always @(posedge clk or negedge rst_n)
    if (!rst_n) begin
      state <= 4'b0001;
      wait_time <= 10'd0;
      before <= 12'd0;
      warned <= 1'b0;
      alarm_n <= 1'b1;
    end else begin
      before <= level;
      warned <= over & rising;
      alarm_n <= ~(warned & over);
      wait_time <= |(state & 4'b1010) ? wait_time + 10'd1 : 10'd0;
      case (1'b1)
        state[0]: if (over) state <= 4'b0010;
        state[1]: if (&wait_time) state <= 4'b0100;
        state[2]: if (!over & !rising) state <= 4'b1000;
        state[3]: if (&wait_time) state <= 4'b0001;
        default: state <= 4'b0001;
      endcase
    end
  assign gate_open = state[1];
  assign gate_close = state[3];
  assign alarm = ~alarm_n;
endmodule

// A clock divided by eight, each stage clocked by the one before it.
module slow_clock (clk, rst_n, slow);
  input clk, rst_n;
  output slow;
  reg by_2, by_4, by_8;
  always @(posedge clk or negedge rst_n) if (!rst_n) by_2 <= 1'b0; else by_2 <= ~by_2;
  always @(posedge by_2 or negedge rst_n) if (!rst_n) by_4 <= 1'b0; else by_4 <= ~by_4;
  always @(posedge by_4 or negedge rst_n) if (!rst_n) by_8 <= 1'b0; else by_8 <= ~by_8;
  assign slow = by_8;
endmodule

// Sends a frame to the shore, and keeps a beacon turning in a long shift register.
module shore_sender (clk, rst_n, alarm, level, serial_out, beacon);
  input clk, rst_n, alarm;
  input [7:0] level;
  output serial_out, beacon;
  reg [10:0] frame;
  reg [3:0] left;
  reg [15:0] turn;
  always @(posedge clk or negedge rst_n)
    if (!rst_n) begin
      frame <= 11'h7ff;
      left <= 4'd0;
      turn <= 16'h0001;
    end else begin
      if (left == 4'd0) begin
        frame <= {^{level, alarm}, alarm, level, 1'b0};
        left <= 4'd10;
      end else begin
        frame <= {1'b1, frame[10:1]};
        left <= left - 4'd1;
      end
      turn <= {turn[14:0], turn[15]};
    end
  assign serial_out = frame[0];
  wire lamp_n;
  flop_inverse_w1 lamp (.D(turn[15]), .CK(clk), .QN(lamp_n));
  assign beacon = ~lamp_n;
endmodule

// Level-sensitive storage on two phases that never overlap: pairs, and a master that is used.
module phase_guard (phase_1, phase_2, level, safe);
  input phase_1, phase_2;
  input [7:0] level;
  output [7:0] safe;
  wire [15:0] now, first, second;
  wire [7:0] mixed = second[7:0] ^ {second[6:0], second[7]};
  assign now = {mixed & level, level ^ second[15:8]};
  latch_w1 master [15:0] (.D(now), .G(phase_1), .Q(first), .QN());
  latch_w1 slave [15:0] (.D(first), .G(phase_2), .Q(second), .QN());
  assign safe = second[15:8] | (first[7:0] & level);
endmodule
