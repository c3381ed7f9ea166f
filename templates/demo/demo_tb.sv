// Self-checking test of the tide gauge: a model beside the design, compared in every clock cycle of a long random run.
// It knows nothing of clock gating: a test port that a rewrite adds stays unconnected. The reset is low from time 0,
// without an edge, and comes once more in the middle of the run.
module demo_tb;
    logic        clk = 1'b0;
    logic        rst_n = 1'b0;
    logic        adc_valid = 1'b0, bus_write = 1'b0, radio_ready = 1'b0, dark = 1'b0;
    logic [11:0] adc_data = '0;
    logic [4:0]  bus_address = '0;
    logic [15:0] bus_data = '0;
    logic [3:0]  journal_line = '0, straps = 4'h9;
    logic [15:0] bus_read, journal_data, reports, uptime;
    logic        radio_carrier, radio_symbol, lamp, alarm;
    logic [3:0]  lamp_mode;
    logic [11:0] level, mean, highest, lowest;

    tide_gauge dut (
        .clk(clk), .rst_n(rst_n), .adc_valid(adc_valid), .adc_data(adc_data), .bus_write(bus_write),
        .bus_address(bus_address), .bus_data(bus_data), .bus_read(bus_read), .journal_line(journal_line),
        .journal_data(journal_data), .radio_ready(radio_ready), .radio_carrier(radio_carrier),
        .radio_symbol(radio_symbol), .reports(reports), .dark(dark), .straps(straps), .lamp(lamp),
        .lamp_mode(lamp_mode), .level(level), .mean(mean), .highest(highest), .lowest(lowest), .alarm(alarm),
        .uptime(uptime)
    );

    always #5 clk = ~clk;

    // ---- stimulus: quiet and busy spells, driven like the outputs of clocked logic ----
    integer      cycle = 0;
    logic [31:0] dice = 32'h0b0a_51de;
    wire         busy_spell = cycle[8];
    function automatic logic [31:0] roll(input logic [31:0] now);
        logic [31:0] next;
        next = now ^ (now << 13);
        next = next ^ (next >> 17);
        return next ^ (next << 5);
    endfunction
    always @(posedge clk) begin
        cycle <= cycle + 1;
        dice <= roll(dice);
        adc_valid <= busy_spell ? dice[1:0] == 2'd0 : dice[4:0] == 5'd0;
        adc_data <= dice[20:9];
        bus_write <= busy_spell ? dice[22:21] == 2'd0 : dice[27:21] == 7'd0;
        bus_address <= dice[31:27];
        // Reports come often when the interval is short.
        bus_data <= dice[31:27] == 5'd2 ? {13'd0, dice[5:3]} : dice[18:3];
        journal_line <= dice[8:5];
        radio_ready <= dice[12] | busy_spell;
        dark <= cycle[6];
        straps <= cycle < 12 ? 4'h9 : dice[3:0];
        rst_n <= cycle >= 6 && (cycle < 5000 || cycle >= 5007);
    end

    // ---- model of the registers ----
    logic        m_rst, m_rst_early;
    logic [11:0] m_tap [0:3];
    logic [11:0] m_highest, m_lowest, m_datum, m_alarm_level, m_corrected;
    logic [15:0] m_every, m_countdown, m_uptime, m_read;
    logic [7:0]  m_station;
    logic [15:0] m_calibration [0:7];
    logic [15:0] m_journal [0:15];
    logic [3:0]  m_line;
    logic        m_alarm, m_due;
    logic [7:0]  m_pattern;
    logic [3:0]  m_mode;
    integer      heard = -1;       // symbols of the present report that were heard; below 0: silent
    integer      warm = 0;         // cycles of carrier before the first symbol
    logic [39:0] words;
    logic [31:0] expected;
    logic [15:0] m_reports;
    wire  [13:0] m_sum = 14'(m_tap[0]) + 14'(m_tap[1]) + 14'(m_tap[2]) + 14'(m_tap[3]);
    wire  [11:0] m_mean = m_sum[13:2];

    task automatic model_sample;
        if (bus_write && bus_address == 5'd4) begin
            m_highest = '0;
            m_lowest = '1;
        end else if (adc_valid) begin
            if (m_corrected > m_highest) m_highest = m_corrected;
            if (m_corrected < m_lowest) m_lowest = m_corrected;
        end
        if (adc_valid) begin
            for (int i = 3; i > 0; i--) m_tap[i] = m_tap[i-1];
            m_tap[0] = m_corrected;
        end
        m_uptime = m_uptime + 16'd1;
    endtask

    task automatic model_bus;
        if (bus_write) begin
            m_journal[m_line] = bus_data;
            m_line = m_line + 4'd1;
            if (bus_address == 5'd0) m_datum = bus_data[11:0];
            if (bus_address == 5'd1) m_alarm_level = bus_data[11:0];
            if (bus_address == 5'd2) m_every = bus_data;
            if (bus_address == 5'd3) m_station = bus_data[7:0];
            if (bus_address[4:3] == 2'b01) m_calibration[bus_address[2:0]] = bus_data;
        end else if (bus_address[3]) m_read = m_calibration[bus_address[2:0]];
        else
            case (bus_address[1:0])
                2'd0: m_read = {4'd0, m_datum};
                2'd1: m_read = {4'd0, m_alarm_level};
                2'd2: m_read = m_every;
                default: m_read = {8'd0, m_station};
            endcase
    endtask

    task automatic model_reset;
        for (int i = 0; i < 4; i++) m_tap[i] = '0;
        m_highest = '0;
        m_lowest = '1;
        m_uptime = '0;
        m_mode = straps;
        {m_rst, m_rst_early} = 2'b11;
    endtask

    always @(posedge clk) begin
        m_corrected = adc_data < m_datum ? 12'd0 : adc_data - m_datum;
        m_due = adc_valid && m_countdown == 16'd0 && !m_rst;
        model_radio({m_station, m_tap[0], m_mean});
        if (m_rst) begin
            m_datum = '0;
            m_alarm_level = '1;
            m_every = 16'd600;
            m_station = '0;
            m_read = '0;
            m_line = '0;
            for (int i = 0; i < 8; i++) m_calibration[i] = '0;
            m_countdown = 16'd3;
            m_alarm = 1'b0;
        end else begin
            if (adc_valid) m_countdown = m_due ? m_every : m_countdown - 16'd1;
            if (adc_valid && m_mean > m_alarm_level) m_alarm = 1'b1;
            else if (bus_write && bus_address == 5'd5) m_alarm = 1'b0;
            model_bus;
        end
        if (!rst_n) model_reset;
        else begin
            if (bus_write && bus_address == 5'd6) m_mode = bus_data[3:0];
            model_sample;
            {m_rst, m_rst_early} = {m_rst_early, 1'b0};
        end
    end

    // The lantern's pattern moves at the falling edge.
    always @(negedge clk)
        if (!rst_n) m_pattern = 8'h80;
        else if (bus_write && bus_address == 5'd6) m_pattern = bus_data[7:0];
        else if (dark && adc_valid) m_pattern = {m_pattern[6:0], m_pattern[7]};

    // The reset is asynchronous for some registers: it need not wait for the clock.
    always @(negedge rst_n) begin
        model_reset;
        m_pattern = 8'h80;
    end

    // The radio: decode what is sent, bit by bit, and compare it with the report that was due.
    function automatic logic [7:0] checksum_of(input logic [31:0] bits);
        checksum_of = 8'hff;
        for (int i = 31; i >= 0; i--)
            checksum_of = {checksum_of[6:0], checksum_of[7] ^ bits[i]} ^ (checksum_of[7] ? 8'h04 : 8'h00);
    endfunction
    task automatic model_radio(input logic [31:0] report);
        if (m_rst) begin
            heard = -1;
            m_reports = '0;
        end else if (heard < 0) begin
            if (m_due) begin
                heard = 0;
                warm = 16;
                expected = report;
            end
        end else if (warm > 0) warm = warm - 1;
        else if (radio_ready) begin
            words = {words[38:0], radio_symbol};
            heard = heard + 1;
            if (heard == 40) begin
                check("report", words, {expected, checksum_of(expected)});
                m_reports = m_reports + 16'd1;
                heard = -1;
            end
        end
    endtask

    // ---- comparison, late in the low phase when everything is still ----
    integer checks = 0, errors = 0;
    task automatic check(input string what, input logic [39:0] found, input logic [39:0] wanted);
        checks = checks + 1;
        if (found !== wanted) begin
            errors = errors + 1;
            if (errors <= 10) $display("cycle %0d: %s is %h, should be %h", cycle, what, found, wanted);
        end
    endtask
    always @(negedge clk) begin
        #3;
        if (cycle >= 4) begin
            check("level", 40'(level), 40'(m_tap[0]));
            check("mean", 40'(mean), 40'(m_mean));
            check("highest", 40'(highest), 40'(m_highest));
            check("lowest", 40'(lowest), 40'(m_lowest));
            check("uptime", 40'(uptime), 40'(m_uptime));
            check("bus_read", 40'(bus_read), 40'(m_read));
            check("alarm", 40'(alarm), 40'(m_alarm));
            check("reports", 40'(reports), 40'(m_reports));
            check("carrier", 40'(radio_carrier), {39'd0, heard >= 0});
            check("lamp", 40'(lamp), {39'd0, dark & m_pattern[7]});
            check("lamp_mode", 40'(lamp_mode), 40'(m_mode));
        end
        if (cycle >= 1500) check("journal", 40'(journal_data), 40'(m_journal[journal_line]));
        if (cycle == 12000) begin
            check("enough reports", {39'd0, m_reports > 16'd20}, 40'd1);
            if (errors == 0) $display("TIDE GAUGE: all %0d checks passed", checks);
            else $display("TIDE GAUGE: %0d of %0d checks FAILED", errors, checks);
            $finish;
        end
    end
endmodule
